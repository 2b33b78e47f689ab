'use client';

import { useState, type FormEvent } from 'react';
import { Button } from '@/components/ui/button';
import { TextInput } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import type { Problem } from './problem';
import { useFaultFocus } from './use-fault-focus';

/** Asks for address and password, for those of the staff who have one. */
export function PasswordStep({
  email,
  onEmail,
  onPassword,
  onForgotten,
  onCode,
}: {
  readonly email: string;
  readonly onEmail: (email: string) => void;
  /** Checks the password; the problem, or null when it was right. */
  readonly onPassword: (password: string) => Promise<Problem | null>;
  /** Sends a code to set a new password. */
  readonly onForgotten: () => Promise<Problem | null>;
  readonly onCode: () => void;
}) {
  const [password, setPassword] = useState('');
  const [problem, setProblem] = useState<Problem | null>(null);
  const form = useFaultFocus(problem);
  const [busy, setBusy] = useState(false);

  const isWhole = () => {
    if (/^[^\s@]+@[^\s@]+\.[^\s@]+$/.test(email.trim())) return true;
    setProblem({ field: 'email', sentence: 'This is not a whole mail address.' });
    return false;
  };

  async function check(event: FormEvent) {
    event.preventDefault();
    if (busy || !isWhole()) return;
    if (password === '') {
      setProblem({ field: 'password', sentence: 'Please type the password.' });
      return;
    }
    setBusy(true);
    const found = await onPassword(password);
    setProblem(found);
    if (found) setBusy(false);
  }

  async function forgotten() {
    if (busy || !isWhole()) return;
    setBusy(true);
    const found = await onForgotten();
    setProblem(found);
    setBusy(false);
  }

  return (
    <form ref={form} method="post" onSubmit={check} className="grid gap-5" noValidate>
      {problem?.field === null && <Notice kind="error">{problem.sentence}</Notice>}
      <TextInput
        label="Mail address"
        fault={problem?.field === 'email' ? problem.sentence : null}
        name="email"
        type="email"
        autoFocus={email === ''}
        inputMode="email"
        autoComplete="username"
        autoCapitalize="none"
        spellCheck={false}
        value={email}
        onChange={(event) => onEmail(event.target.value)}
      />
      <TextInput
        label="Password"
        fault={problem?.field === 'password' ? problem.sentence : null}
        name="password"
        type="password"
        autoFocus={email !== ''}
        autoComplete="current-password"
        value={password}
        onChange={(event) => setPassword(event.target.value)}
      />
      <div className="flex flex-wrap gap-3">
        <Button type="submit" disabled={busy}>
          Sign in
        </Button>
        <Button tone="quiet" onClick={onCode}>
          Send me a code instead
        </Button>
      </div>
      <div className="grid justify-items-start gap-2 border-t border-hairline pt-4">
        <p className="text-note text-quiet">A code by mail lets you set a new one.</p>
        <Button tone="quiet" onClick={forgotten} disabled={busy}>
          I forgot my password
        </Button>
      </div>
    </form>
  );
}
