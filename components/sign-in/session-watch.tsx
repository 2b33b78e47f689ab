'use client';

import { useAuth } from '@clerk/nextjs';
import { usePathname, useSearchParams } from 'next/navigation';
import { useEffect, useState } from 'react';
import { useContractor } from '@/components/portal/contractor';
import { ButtonLink } from '@/components/ui/button';
import { renewSession } from '@/components/ui/json';
import { Notice } from '@/components/ui/notice';
import { paths } from '@/lib/paths';
import { isLeaving } from './leaving';

/**
 * Keeps a page's session fresh, and says so when it has ended while the page was open: in another window, by time, or
 * because the account was closed. What is on the page stays.
 */
export function SessionWatch() {
  const { isLoaded, isSignedIn, getToken } = useAuth();
  const [wasSignedIn, setWasSignedIn] = useState(false);
  const contractor = useContractor();
  const pathname = usePathname();
  const search = useSearchParams().toString();

  if (isLoaded && isSignedIn && !wasSignedIn) setWasSignedIn(true);

  // A window that slept comes back with a token that has run out; the next call waits for a fresh one.
  useEffect(() => renewSession(async () => (await getToken({ skipCache: true })) !== null), [getToken]);

  if (!contractor || !wasSignedIn || !isLoaded || isSignedIn || isLeaving()) return null;
  const back = pathname + (search === '' ? '' : `?${search}`);
  const signIn = `${paths.signIn(contractor.slug)}?${new URLSearchParams({ back }).toString()}`;
  return (
    <div className="fixed inset-x-0 bottom-0 z-50 p-frame">
      <Notice
        kind="caution"
        title="You are signed out"
        className="mx-auto max-w-5xl"
        action={<ButtonLink href={signIn}>Sign in again</ButtonLink>}
      >
        <p role="alert">
          The sign-in ended by itself or in another window. Sign in again to go on where you were.
        </p>
      </Notice>
    </div>
  );
}
