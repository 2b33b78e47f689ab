'use client';

import { useContractor } from '@/components/portal/contractor';
import { Button } from '@/components/ui/button';
import { Frame } from '@/components/ui/frame';
import { ErrorState } from '@/components/ui/states';

/** A fault inside a contractor's pages: their telephone is on it. */
export default function CompanyError({
  error,
  reset,
}: {
  error: Error & { digest?: string };
  reset: () => void;
}) {
  const contractor = useContractor();
  return (
    <Frame className="mx-auto max-w-5xl">
      <main className="grid gap-frame">
        <ErrorState
          id={error.digest}
          contact={contractor}
          actions={<Button onClick={reset}>Try again</Button>}
        />
      </main>
    </Frame>
  );
}
