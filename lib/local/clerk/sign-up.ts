import { attemptCode, issueCode } from './codes';
import { ClerkFault, formFault } from './fault';
import type { Instance } from './instance';
import { hashPassword } from './passwords';
import { refuseSecondSession } from './sign-in';
import { newId, type Client, type SignUp } from './store';

const ADDRESS = /^[^\s@]+@[^\s@]+\.[^\s@]+$/;

function freeAddress(instance: Instance, address: string | null): string {
  const email = address?.trim().toLowerCase() ?? '';
  if (!ADDRESS.test(email)) {
    throw formFault(
      'form_param_format_invalid',
      'email_address',
      'The email address must be a valid email address.',
    );
  }
  if (instance.store.userByEmail(email)) {
    throw formFault(
      'form_identifier_exists',
      'email_address',
      'That email address is taken. Please try another.',
    );
  }
  return email;
}

/** Begins a sign-up; it is complete when the address was shown to be theirs. */
export function createSignUp(
  instance: Instance,
  client: Client,
  given: {
    readonly email: string | null;
    readonly firstName: string | null;
    readonly lastName: string | null;
    readonly password: string | null;
  },
): SignUp {
  refuseSecondSession(instance, client);
  const signUp: SignUp = {
    id: newId('sua'),
    clientId: client.id,
    email: freeAddress(instance, given.email),
    firstName: given.firstName,
    lastName: given.lastName,
    passwordHash: given.password ? hashPassword(given.password) : null,
    status: 'missing_requirements',
    verification: null,
    createdUserId: null,
    createdSessionId: null,
    createdAt: Date.now(),
  };
  instance.store.state.signUps[signUp.id] = signUp;
  client.signUpId = signUp.id;
  return signUp;
}

export async function prepareVerification(
  instance: Instance,
  signUp: SignUp,
  strategy: string | null,
): Promise<void> {
  if (strategy !== 'email_code') {
    throw formFault('form_param_value_invalid', 'strategy', 'Only email_code is set up.');
  }
  const issued = issueCode(signUp.verification, strategy);
  await instance.mail.send(signUp.email, issued.code, strategy);
  signUp.verification = issued;
}

/** Checks the code; when it is right, the user and a session are there. */
export function attemptVerification(
  instance: Instance,
  client: Client,
  signUp: SignUp,
  given: { readonly code: string | null; readonly origin: string },
): void {
  if (signUp.status === 'complete') {
    throw new ClerkFault(
      400,
      'verification_already_verified',
      'This verification has already been verified.',
    );
  }
  attemptCode(signUp.verification, given.code ?? '');
  const user = instance.createUser({
    email: freeAddress(instance, signUp.email),
    firstName: signUp.firstName,
    lastName: signUp.lastName,
    passwordHash: signUp.passwordHash,
  });
  signUp.status = 'complete';
  signUp.createdUserId = user.id;
  signUp.createdSessionId = instance.startSession(client, user, given.origin).id;
}
