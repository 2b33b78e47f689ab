'use client';

import { useSignIn } from '@clerk/nextjs';
import { useState } from 'react';
import { AddressStep } from './address-step';
import { CodeStep } from './code-step';
import { NewPasswordStep } from './new-password-step';
import { PasswordStep } from './password-step';
import { isSignedInAlready, problemOf, type Problem } from './problem';

type Step = 'address' | 'code' | 'password' | 'second' | 'resetCode' | 'newPassword';

const TITLES: Readonly<Record<Step, string>> = {
  address: 'Sign in',
  code: 'Look into your mail',
  password: 'Sign in with a password',
  second: 'One more check',
  resetCode: 'Set a new password',
  newPassword: 'Set a new password',
};

/** Signing in at a contractor's: a code by mail for everybody, a password for staff who have one. */
export function SignInForm({
  contractor,
  back,
  email: given = '',
}: {
  readonly contractor: { readonly name: string };
  /** Where to go when signed in; an address of this contractor's. */
  readonly back: string;
  readonly email?: string;
}) {
  const { signIn } = useSignIn();
  const [step, setStep] = useState<Step>('address');
  const [email, setEmail] = useState(given);

  /** Goes on to `next` unless the service refused. */
  async function go(work: Promise<{ error: unknown }>, next?: Step): Promise<Problem | null> {
    const { error } = await work;
    if (error && isSignedInAlready(error)) window.location.assign(back);
    else if (error) return problemOf(error, contractor);
    else if (next) setStep(next);
    return null;
  }

  /** Takes the finished sign-in up and leaves for where the visitor wanted to go. */
  async function finish(): Promise<Problem | null> {
    const { error } = await signIn.finalize({
      navigate: ({ decorateUrl }) => window.location.assign(decorateUrl(back)),
    });
    return error ? problemOf(error, contractor) : null;
  }

  async function finishAfter(work: Promise<{ error: unknown }>): Promise<Problem | null> {
    return (await go(work)) ?? finish();
  }

  const address = () => email.trim().toLowerCase();

  async function withPassword(password: string): Promise<Problem | null> {
    const problem = await go(signIn.password({ identifier: address(), password }));
    if (problem || signIn.status === 'complete') return problem ?? finish();
    // The service may want to see that the mailbox is theirs too, from a device it does not know.
    return go(signIn.mfa.sendEmailCode(), 'second');
  }

  async function forgotten(): Promise<Problem | null> {
    const problem = await go(signIn.create({ identifier: address() }));
    return problem ?? go(signIn.resetPasswordEmailCode.sendCode(), 'resetCode');
  }

  const startOver = () => {
    void signIn.reset();
    setStep('address');
  };
  const code = { email: address(), onBack: startOver };

  return (
    <>
      <h1 className="font-title text-page font-semibold">{TITLES[step]}</h1>
      {step === 'address' && (
        <AddressStep
          email={email}
          onEmail={setEmail}
          onSend={() => go(signIn.emailCode.sendCode({ emailAddress: address() }), 'code')}
          onPassword={() => setStep('password')}
        />
      )}
      {step === 'code' && (
        <CodeStep
          {...code}
          label="Code from the mail"
          submit="Sign in"
          onCode={(typed) => finishAfter(signIn.emailCode.verifyCode({ code: typed }))}
          onResend={() => go(signIn.emailCode.sendCode())}
        />
      )}
      {step === 'password' && (
        <PasswordStep
          email={email}
          onEmail={setEmail}
          onPassword={withPassword}
          onForgotten={forgotten}
          onCode={() => setStep('address')}
        />
      )}
      {step === 'second' && (
        <CodeStep
          {...code}
          label="Code from the mail"
          submit="Sign in"
          onCode={(typed) => finishAfter(signIn.mfa.verifyEmailCode({ code: typed }))}
          onResend={() => go(signIn.mfa.sendEmailCode())}
        />
      )}
      {step === 'resetCode' && (
        <CodeStep
          {...code}
          label="Code from the mail"
          submit="Go on"
          onCode={(typed) => go(signIn.resetPasswordEmailCode.verifyCode({ code: typed }), 'newPassword')}
          onResend={() => go(signIn.resetPasswordEmailCode.sendCode())}
        />
      )}
      {step === 'newPassword' && (
        <NewPasswordStep
          email={address()}
          onPassword={(password) => finishAfter(signIn.resetPasswordEmailCode.submitPassword({ password }))}
        />
      )}
    </>
  );
}
