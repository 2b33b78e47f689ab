'use client';

import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Difference } from '@/components/ui/difference';
import { TextArea } from '@/components/ui/field';
import { LengthText } from '@/components/ui/length';
import { Notice } from '@/components/ui/notice';
import { sendJson } from '@/components/ui/json';
import type { Edition } from '@/lib/engine/edition-types';
import type { Choices } from '@/lib/engine/types';
import { paths } from '@/lib/paths';
import { changeWords } from './decisions';
import { changesBetween } from './scheme-edit';

/** After signing nothing is edited: what differs from what was signed is asked for as a change order. */
export function AskForChange({
  company,
  jobId,
  schemeId,
  agreed,
  choices,
  edition,
  differenceCents,
  reason,
}: {
  company: string;
  jobId: string;
  schemeId: string;
  /** The choices of the newest sealed page. */
  agreed: Choices;
  choices: Choices;
  edition: Edition;
  differenceCents: number;
  /** Why it cannot be asked now. */
  reason: string | null;
}) {
  const router = useRouter();
  const [open, setOpen] = useState(false);
  const [why, setWhy] = useState('');
  const [busy, setBusy] = useState(false);
  const [fault, setFault] = useState<string | null>(null);
  const changes = changesBetween(agreed, choices);

  async function ask() {
    setBusy(true);
    setFault(null);
    const answer = await sendJson<{ id: string }>(paths.api.changeOrders(company, jobId), 'POST', {
      schemeId,
      reason: why.trim(),
    });
    if (answer.ok) router.push(paths.changeOrder(company, jobId, answer.value.id));
    else {
      setBusy(false);
      setFault(answer.fault.sentence);
    }
  }

  // The tape says already that nothing differs from what was signed.
  if (changes.length === 0) return null;
  return (
    <>
      <Button reason={reason} onClick={() => setOpen(true)}>
        Ask for this change
      </Button>
      <Dialog
        open={open}
        onOpenChange={setOpen}
        title="Ask for this change"
        about="It becomes a change order: you see it in full and sign it, then the contractor approves it or says why not."
        actions={
          <Button disabled={busy} onClick={() => void ask()}>
            {busy ? 'Preparing' : 'Prepare the change order'}
          </Button>
        }
      >
        <div className="grid gap-5">
          <ul>
            {changes.map((change) => (
              <li key={JSON.stringify(change)} className="border-b border-hairline py-1">
                <LengthText text={changeWords(edition, change)} />
              </li>
            ))}
          </ul>
          <p className="text-price font-semibold">
            <Difference cents={differenceCents} than="than signed" />
          </p>
          <TextArea
            label="Why, if you like"
            value={why}
            onChange={(event) => setWhy(event.target.value)}
            maxLength={500}
          />
          {fault && <Notice kind="error">{fault}</Notice>}
        </div>
      </Dialog>
    </>
  );
}
