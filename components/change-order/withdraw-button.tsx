'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { sendJson } from '@/components/ui/json';
import { Notice } from '@/components/ui/notice';
import { paths } from '@/lib/paths';

/** Takes one's own open change order back. */
export function WithdrawButton({
  company,
  jobId,
  orderId,
}: {
  company: string;
  jobId: string;
  orderId: string;
}) {
  const router = useRouter();
  const [busy, setBusy] = useState(false);
  const [fault, setFault] = useState<string | null>(null);

  async function withdraw() {
    setBusy(true);
    const answer = await sendJson(paths.api.changeOrder(company, jobId, orderId), 'DELETE', {});
    setBusy(false);
    if (answer.ok) router.refresh();
    else setFault(answer.fault.sentence);
  }

  return (
    <>
      <Button tone="quiet" disabled={busy} onClick={() => void withdraw()}>
        Take this change back
      </Button>
      {fault && <Notice kind="error">{fault}</Notice>}
    </>
  );
}
