'use client';

import { useState, type FormEvent } from 'react';
import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import type { Problem } from './problem';
import { useFaultFocus } from './use-fault-focus';
import { useWait } from './use-wait';

/** Seconds between two mails with a code. */
const RESEND_SECONDS = 30;
const DIGITS = 6;

const readWait = (seconds: number): string =>
  seconds < 90 ? `${seconds} seconds` : `${Math.ceil(seconds / 60)} minutes`;

/** Asks for the code that was mailed, and sends another when the first did not come. */
export function CodeStep({
  email,
  submit,
  label,
  onCode,
  onResend,
  onBack,
}: {
  /** Where the code was sent. */
  readonly email: string;
  /** What the button says. */
  readonly submit: string;
  /** What the code is for, as the label of its field. */
  readonly label: string;
  /** Checks a code; the problem, or null when it was right. */
  readonly onCode: (code: string) => Promise<Problem | null>;
  readonly onResend: () => Promise<Problem | null>;
  /** To take another address; not offered where the address is given. */
  readonly onBack?: () => void;
}) {
  const [code, setCode] = useState('');
  const [problem, setProblem] = useState<Problem | null>(null);
  const form = useFaultFocus(problem);
  const [busy, setBusy] = useState(false);
  const [sent, setSent] = useState(1);
  const [wait, beginWait] = useWait(RESEND_SECONDS);

  async function check(event: FormEvent) {
    event.preventDefault();
    if (busy) return;
    const digits = code.replace(/\D/g, '');
    if (digits.length !== DIGITS) {
      setProblem({ field: 'code', sentence: `The code has ${DIGITS} digits.` });
      return;
    }
    setBusy(true);
    const found = await onCode(digits);
    setProblem(found);
    // After the right code the page is being left, so nothing may be pressed again.
    if (found) setBusy(false);
  }

  async function resend() {
    if (busy) return;
    setBusy(true);
    // Emptied at the press: the new code may come, and be typed, before the answer does.
    setCode('');
    const found = await onResend();
    setBusy(false);
    setProblem(found);
    beginWait(found?.waitSeconds ?? RESEND_SECONDS);
    if (!found) setSent((count) => count + 1);
  }

  return (
    <form ref={form} method="post" onSubmit={check} className="grid gap-5" noValidate>
      <p role="status" className="max-w-prose">
        {sent === 1 ? 'A code was sent to ' : 'A new code was sent to '}
        <strong className="break-words">{email}</strong>
        {sent === 1 ? '.' : '. Only the newest is good.'}
      </p>
      {problem?.field === null && <Notice kind="error">{problem.sentence}</Notice>}
      <TextInput
        key={sent}
        label={label}
        hint="Six digits, good for 10 minutes."
        fault={problem?.field === 'code' ? problem.sentence : null}
        name="code"
        inputMode="numeric"
        autoComplete="one-time-code"
        autoFocus
        maxLength={12}
        value={code}
        onChange={(event) => setCode(event.target.value)}
        className="max-w-60 [&_input]:text-part [&_input]:tracking-widest [&_input]:tabular-nums"
      />
      <div className="flex flex-wrap gap-3">
        <Button type="submit" disabled={busy || problem?.newCode === true}>
          {submit}
        </Button>
        {onBack && (
          <Button tone="quiet" onClick={onBack}>
            Use another address
          </Button>
        )}
      </div>
      <div className="grid justify-items-start gap-2 border-t border-hairline pt-4">
        <p className="text-note text-quiet">No mail yet? It can take a minute. Look among the junk too.</p>
        <Button
          tone="quiet"
          onClick={resend}
          disabled={busy}
          reason={wait > 0 && !problem?.newCode ? `Possible in ${readWait(wait)}.` : null}
        >
          Send a new code
        </Button>
      </div>
    </form>
  );
}
