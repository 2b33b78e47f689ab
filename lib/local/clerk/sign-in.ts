import { attemptCode, issueCode } from './codes';
import { ClerkFault, formFault, notFound } from './fault';
import type { Instance } from './instance';
import { checkPassword, hashPassword } from './passwords';
import { primaryEmail } from './objects';
import { newId, type Client, type SignIn, type User } from './store';

type MailedStrategy = 'email_code' | 'reset_password_email_code';
const isMailed = (strategy: string | null): strategy is MailedStrategy =>
  strategy === 'email_code' || strategy === 'reset_password_email_code';

/** Throws when the browser is signed in already: one account at a time. */
export function refuseSecondSession(instance: Instance, client: Client): void {
  if (!instance.activeSession(client)) return;
  throw new ClerkFault(400, 'session_exists', 'You are already signed in.');
}

/** Begins a sign-in; with a password it may be complete at once. */
export function createSignIn(
  instance: Instance,
  client: Client,
  given: { readonly identifier: string | null; readonly password: string | null; readonly origin: string },
): SignIn {
  refuseSecondSession(instance, client);
  const user = given.identifier === null ? undefined : instance.store.userByEmail(given.identifier);
  if (given.identifier !== null && !user) {
    throw formFault('form_identifier_not_found', 'identifier', "Couldn't find your account.");
  }
  const signIn: SignIn = {
    id: newId('sia'),
    clientId: client.id,
    identifier: given.identifier,
    userId: user?.id ?? null,
    status: user ? 'needs_first_factor' : 'needs_identifier',
    verification: null,
    createdSessionId: null,
    createdAt: Date.now(),
  };
  instance.store.state.signIns[signIn.id] = signIn;
  client.signInId = signIn.id;
  if (user && given.password !== null) {
    attemptPassword(instance, client, signIn, user, given.password, given.origin);
  }
  return signIn;
}

function complete(instance: Instance, client: Client, signIn: SignIn, user: User, origin: string): void {
  signIn.status = 'complete';
  signIn.createdSessionId = instance.startSession(client, user, origin).id;
}

function attemptPassword(
  instance: Instance,
  client: Client,
  signIn: SignIn,
  user: User,
  password: string,
  origin: string,
): void {
  if (user.passwordHash === null) {
    throw new ClerkFault(
      400,
      'strategy_for_user_invalid',
      'The verification strategy is not valid for this account.',
    );
  }
  checkPassword(instance.store, user, password);
  signIn.verification = {
    strategy: 'password',
    status: 'verified',
    code: null,
    attempts: 1,
    sentAt: [],
    expireAt: null,
  };
  complete(instance, client, signIn, user, origin);
}

function userOf(instance: Instance, signIn: SignIn): User {
  if (signIn.userId === null) throw new ClerkFault(400, 'sign_in_no_identification', 'No account was named.');
  return instance.user(signIn.userId);
}

/** Mails a code. */
export async function prepareFirstFactor(
  instance: Instance,
  signIn: SignIn,
  strategy: string | null,
): Promise<void> {
  const user = userOf(instance, signIn);
  const email = primaryEmail(user);
  if (!isMailed(strategy) || !email) {
    throw formFault('strategy_for_user_invalid', 'strategy', 'The strategy is not valid for this account.');
  }
  const earlier = signIn.verification?.strategy === strategy ? signIn.verification : null;
  const issued = issueCode(earlier, strategy);
  await instance.mail.send(email.address, issued.code, strategy);
  signIn.verification = issued;
  signIn.status = 'needs_first_factor';
}

/** Checks a code or a password. */
export function attemptFirstFactor(
  instance: Instance,
  client: Client,
  signIn: SignIn,
  given: {
    readonly strategy: string | null;
    readonly code: string | null;
    readonly password: string | null;
    readonly origin: string;
  },
): void {
  const user = userOf(instance, signIn);
  if (given.strategy === 'password') {
    attemptPassword(instance, client, signIn, user, given.password ?? '', given.origin);
    return;
  }
  const wanted = signIn.verification?.strategy === given.strategy ? signIn.verification : null;
  attemptCode(wanted, given.code ?? '');
  if (given.strategy === 'reset_password_email_code') signIn.status = 'needs_new_password';
  else complete(instance, client, signIn, user, given.origin);
}

/** Sets the new password after its code was right, and signs in. */
export function resetPassword(
  instance: Instance,
  client: Client,
  signIn: SignIn,
  given: {
    readonly password: string | null;
    readonly signOutOfOtherSessions: boolean;
    readonly origin: string;
  },
): void {
  if (signIn.status !== 'needs_new_password') throw notFound('sign-in that waits for a new password');
  const user = userOf(instance, signIn);
  user.passwordHash = hashPassword(given.password ?? '');
  user.updatedAt = Date.now();
  delete instance.store.state.wrongPasswords[user.id];
  if (given.signOutOfOtherSessions) instance.endSessions(user.id, () => true);
  complete(instance, client, signIn, user, given.origin);
}
