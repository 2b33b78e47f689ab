'use client';

import { useState, type FormEvent } from 'react';
import { Button } from '@/components/ui/button';
import { Checkbox, TextInput } from '@/components/ui/field';
import { Notice } from '@/components/ui/notice';
import type { Problem } from './problem';
import { useFaultFocus } from './use-fault-focus';

/** Takes the new password once its code was right. */
export function NewPasswordStep({
  email,
  onPassword,
}: {
  readonly email: string;
  readonly onPassword: (password: string) => Promise<Problem | null>;
}) {
  const [password, setPassword] = useState('');
  const [shown, setShown] = useState(false);
  const [problem, setProblem] = useState<Problem | null>(null);
  const form = useFaultFocus(problem);
  const [busy, setBusy] = useState(false);

  async function set(event: FormEvent) {
    event.preventDefault();
    if (busy) return;
    setBusy(true);
    const found = await onPassword(password);
    setProblem(found);
    if (found) setBusy(false);
  }

  return (
    <form ref={form} method="post" onSubmit={set} className="grid gap-5" noValidate>
      {problem && problem.field !== 'password' && <Notice kind="error">{problem.sentence}</Notice>}
      <input type="hidden" name="email" autoComplete="username" value={email} />
      <TextInput
        label="New password"
        hint="8 characters or more. Several words in a row are easy to keep in mind."
        fault={problem?.field === 'password' ? problem.sentence : null}
        name="password"
        type={shown ? 'text' : 'password'}
        autoComplete="new-password"
        autoFocus
        value={password}
        onChange={(event) => setPassword(event.target.value)}
      />
      <Checkbox
        label="Show what I type"
        checked={shown}
        onChange={(event) => setShown(event.target.checked)}
      />
      <div>
        <Button type="submit" disabled={busy}>
          Set it and sign in
        </Button>
      </div>
    </form>
  );
}
