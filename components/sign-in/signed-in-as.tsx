'use client';

import { useUser } from '@clerk/nextjs';
import { useContractor } from '@/components/portal/contractor';
import { paths } from '@/lib/paths';
import { SignOutButton } from './sign-out-button';

/** With which address this browser is signed in, and the way out. */
export function SignedInAs() {
  const { user } = useUser();
  const contractor = useContractor();
  if (!user || !contractor) return null;
  return (
    <div className="flex flex-wrap items-center justify-between gap-x-5 gap-y-2 px-3 py-2 text-note text-quiet md:px-5">
      <p className="min-w-0 break-words">Signed in as {user.primaryEmailAddress?.emailAddress}</p>
      <SignOutButton to={paths.signIn(contractor.slug)} />
    </div>
  );
}
