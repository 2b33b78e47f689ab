'use client';

import { useSignIn, useSignUp } from '@clerk/nextjs';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { sendJson } from '@/components/ui/json';
import type { Acceptance } from '@/lib/contracts/invitation';
import { splitName } from '@/lib/contracts/sign-in';
import { paths } from '@/lib/paths';
import { CodeStep } from './code-step';
import { isSignedInAlready, isUnknownAddress, problemOf, type Problem } from './problem';

interface Props {
  readonly company: { readonly slug: string; readonly name: string };
  readonly token: string;
  readonly email: string;
  /** As the invitation greets them; their sign-in gets it when they have none yet. */
  readonly name: string;
  /** Whether they are signed in with the invited address already. */
  readonly signedIn: boolean;
}

/** Lets the invited in: a code to the invited address, a sign-in for whoever has none, then the kitchen. */
export function InvitationForm({ company, token, email, name, signedIn }: Props) {
  const { signIn } = useSignIn();
  const { signUp } = useSignUp();
  const [mode, setMode] = useState<'ask' | 'signIn' | 'signUp'>('ask');
  const [problem, setProblem] = useState<Problem | null>(null);
  const [busy, setBusy] = useState(false);

  /** Accepts and leaves for the kitchen. */
  async function accept(): Promise<Problem | null> {
    const address = paths.api.invitationAcceptance(company.slug, token);
    const answer = await sendJson<Acceptance>(address, 'POST', {});
    if (!answer.ok) return { field: null, sentence: answer.fault.sentence };
    window.location.assign(paths.job(company.slug, answer.value.jobId));
    return null;
  }

  async function sendCode(): Promise<Problem | null> {
    const { error } = await signIn.emailCode.sendCode({ emailAddress: email });
    if (!error) {
      setMode('signIn');
      return null;
    }
    if (isSignedInAlready(error)) {
      window.location.reload();
      return null;
    }
    if (!isUnknownAddress(error)) return problemOf(error, company);
    return startSignUp();
  }

  /** The first visit of somebody whom the sign-in service does not know. */
  async function startSignUp(): Promise<Problem | null> {
    const begun = await signUp.create({ emailAddress: email, ...splitName(name) });
    if (begun.error) return problemOf(begun.error, company);
    const sent = await signUp.verifications.sendEmailCode();
    if (sent.error) return problemOf(sent.error, company);
    setMode('signUp');
    return null;
  }

  async function checkCode(code: string): Promise<Problem | null> {
    const { error } =
      mode === 'signUp'
        ? await signUp.verifications.verifyEmailCode({ code })
        : await signIn.emailCode.verifyCode({ code });
    if (error) return problemOf(error, company);
    let accepted: Problem | null = null;
    const navigate = async () => {
      accepted = await accept();
    };
    const finished = await (mode === 'signUp'
      ? signUp.finalize({ navigate })
      : signIn.finalize({ navigate }));
    return finished.error ? problemOf(finished.error, company) : accepted;
  }

  async function resend(): Promise<Problem | null> {
    const { error } = await (mode === 'signUp'
      ? signUp.verifications.sendEmailCode()
      : signIn.emailCode.sendCode());
    return error ? problemOf(error, company) : null;
  }

  async function press() {
    if (busy) return;
    setBusy(true);
    const found = await (signedIn ? accept() : sendCode());
    setProblem(found);
    if (found || !signedIn) setBusy(false);
  }

  if (mode !== 'ask') {
    return (
      <CodeStep
        email={email}
        label="Code from the mail"
        submit="Open my kitchen"
        onCode={checkCode}
        onResend={resend}
      />
    );
  }
  return (
    <div className="grid gap-5">
      {problem && <Notice kind="error">{problem.sentence}</Notice>}
      {!signedIn && (
        <p className="max-w-prose">
          To see that it is you, a code is sent to <strong className="break-words">{email}</strong>. You need
          no password.
        </p>
      )}
      {/* The sign-in service may ask here whether a person is signing up. */}
      <div id="clerk-captcha" />
      <div>
        <Button onClick={press} disabled={busy}>
          {signedIn ? 'Open my kitchen' : 'Send me the code'}
        </Button>
      </div>
    </div>
  );
}
