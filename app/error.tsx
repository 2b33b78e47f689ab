'use client';

import { Button } from '@/components/ui/button';
import { Frame } from '@/components/ui/frame';
import { ErrorState } from '@/components/ui/states';

export default function ErrorPage({
  error,
  reset,
}: {
  error: Error & { digest?: string };
  reset: () => void;
}) {
  return (
    <Frame className="mx-auto max-w-5xl">
      <main className="grid gap-frame">
        <ErrorState id={error.digest} actions={<Button onClick={reset}>Try again</Button>}>
          <p>Nothing you entered before is lost. Try again in a moment.</p>
        </ErrorState>
      </main>
    </Frame>
  );
}
