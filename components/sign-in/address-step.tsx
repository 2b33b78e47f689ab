'use client';

import { useState, type FormEvent } from 'react';
import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import type { Problem } from './problem';
import { useFaultFocus } from './use-fault-focus';

/** Asks for the mail address, to send a code there. */
export function AddressStep({
  email,
  onEmail,
  onSend,
  onPassword,
}: {
  readonly email: string;
  readonly onEmail: (email: string) => void;
  /** Sends the code; the problem, or null when it is on its way. */
  readonly onSend: () => Promise<Problem | null>;
  readonly onPassword: () => void;
}) {
  const [problem, setProblem] = useState<Problem | null>(null);
  const form = useFaultFocus(problem);
  const [busy, setBusy] = useState(false);

  async function send(event: FormEvent) {
    event.preventDefault();
    if (busy) return;
    if (!/^[^\s@]+@[^\s@]+\.[^\s@]+$/.test(email.trim())) {
      setProblem({ field: 'email', sentence: 'This is not a whole mail address.' });
      return;
    }
    setBusy(true);
    const found = await onSend();
    setProblem(found);
    setBusy(false);
  }

  return (
    <form ref={form} method="post" onSubmit={send} className="grid gap-5" noValidate>
      {problem?.field === null && <Notice kind="error">{problem.sentence}</Notice>}
      <TextInput
        label="Mail address"
        hint="The one your invitation came to. We send you a code; you need no password."
        fault={problem?.field === 'email' ? problem.sentence : null}
        name="email"
        type="email"
        inputMode="email"
        autoComplete="username"
        autoCapitalize="none"
        spellCheck={false}
        value={email}
        onChange={(event) => onEmail(event.target.value)}
      />
      <div className="flex flex-wrap gap-3">
        <Button type="submit" disabled={busy}>
          Send me a code
        </Button>
        <Button tone="quiet" onClick={onPassword}>
          I have a password
        </Button>
      </div>
    </form>
  );
}
