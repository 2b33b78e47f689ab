'use client';

import { useClerk } from '@clerk/nextjs';
import { useState, type ReactNode } from 'react';
import { Button, type Tone } from '@/components/ui/button';
import { setLeaving } from './leaving';

/** Signs this browser out and goes to `to`, an address of this program. */
export function SignOutButton({
  to,
  tone = 'quiet',
  className,
  children = 'Sign out',
}: {
  readonly to: string;
  readonly tone?: Tone;
  readonly className?: string;
  readonly children?: ReactNode;
}) {
  const { signOut } = useClerk();
  const [busy, setBusy] = useState(false);
  const leave = async () => {
    setBusy(true);
    setLeaving(true);
    try {
      // The whole page is fetched anew, so that nothing of the account stays in the browser's memory.
      await signOut(() => window.location.assign(to));
    } catch {
      setLeaving(false);
      setBusy(false);
    }
  };
  return (
    <Button tone={tone} className={className} disabled={busy} onClick={() => void leave()}>
      {children}
    </Button>
  );
}
