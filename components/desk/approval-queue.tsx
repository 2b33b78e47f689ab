'use client';

import Link from 'next/link';
import { useState } from 'react';
import useSWR from 'swr';
import { Button } from '@/components/ui/button';
import { Difference } from '@/components/ui/difference';
import { Money } from '@/components/ui/money';
import { Notice } from '@/components/ui/notice';
import { readJson, sendJson } from '@/components/ui/json';
import type { ApprovalRow } from '@/lib/contracts/change-order';
import { JOB_STAGE_NAMES } from '@/lib/contracts/states';
import { paths } from '@/lib/paths';

/** Signed change orders that wait for the owner's yes or no. */
export function ApprovalQueue({
  company,
  initial,
  reasonNot,
}: {
  company: string;
  initial: readonly ApprovalRow[];
  /** Why this visitor may not decide, or `null`. */
  reasonNot: string | null;
}) {
  const address = paths.api.approvals(company);
  const { data, mutate } = useSWR<readonly ApprovalRow[]>(address, readJson, { fallbackData: initial });
  const rows = data ?? [];

  if (rows.length === 0) {
    return (
      <p className="py-6 text-reading text-quiet">
        Nothing waits for a decision. A change order arrives here once the household has signed it.
      </p>
    );
  }
  return (
    <ul className="grid gap-frame">
      {rows.map((row) => (
        <Approval
          key={row.id}
          company={company}
          row={row}
          reasonNot={reasonNot}
          onDecided={() => void mutate()}
        />
      ))}
    </ul>
  );
}

function age(hours: number): string {
  if (hours < 1) return 'signed within the hour';
  if (hours < 48) return `signed ${hours} ${hours === 1 ? 'hour' : 'hours'} ago`;
  return `signed ${Math.floor(hours / 24)} days ago`;
}

function Approval({
  company,
  row,
  reasonNot,
  onDecided,
}: {
  company: string;
  row: ApprovalRow;
  reasonNot: string | null;
  onDecided: () => void;
}) {
  const [reason, setReason] = useState('');
  const [busy, setBusy] = useState(false);
  const [fault, setFault] = useState<string | null>(null);

  async function decide(decision: 'approve' | 'decline') {
    setBusy(true);
    setFault(null);
    const answer = await sendJson(paths.api.changeOrderDecision(company, row.jobId, row.id), 'POST', {
      decision,
      reason,
    });
    setBusy(false);
    if (answer.ok) onDecided();
    else setFault(answer.fault.sentence);
  }

  const title = `Change order ${row.number}, ${row.jobName}`;
  return (
    <li className="rounded-frame border border-hairline p-4">
      <div className="flex flex-wrap items-baseline justify-between gap-x-5 gap-y-1">
        <h2 className="font-title text-part">
          <Link href={paths.deskJob(company, row.jobId)} className="underline underline-offset-4">
            {title}
          </Link>
        </h2>
        <Difference cents={row.amountCents} />
      </div>
      <p className="text-note text-quiet">
        {JOB_STAGE_NAMES[row.stage]}, {age(row.ageHours)}, asked by {row.askedBy}
      </p>
      <ul className="my-3 list-none text-reading">
        {row.scope.map((line) => (
          <li key={line}>{line}</li>
        ))}
      </ul>
      <dl className="mb-4 grid grid-cols-[auto_auto] justify-start gap-x-5 gap-y-1 text-reading">
        <dt className="text-quiet">Sum before</dt>
        <dd className="text-right">
          <Money cents={row.sumBeforeCents} />
        </dd>
        <dt className="text-quiet">Sum after</dt>
        <dd className="text-right">
          <Money cents={row.sumBeforeCents + row.amountCents} />
        </dd>
        {row.margin && (
          <>
            <dt className="text-quiet">Margin before</dt>
            <dd className="text-right">
              <Money cents={row.margin.beforeCents} />
            </dd>
            <dt className="text-quiet">Margin after</dt>
            <dd className="text-right">
              <Money cents={row.margin.afterCents} />
            </dd>
          </>
        )}
      </dl>
      {fault && <Notice kind="error">{fault}</Notice>}
      <label className="block max-w-xl">
        <span className="block text-note text-quiet">Reason (needed to decline, read by the homeowner)</span>
        <textarea
          value={reason}
          onChange={(event) => setReason(event.target.value)}
          rows={2}
          className="w-full rounded-frame border border-ink/40 bg-panel p-2 text-reading"
        />
      </label>
      <div className="mt-3 flex flex-wrap gap-3">
        <Button disabled={busy} reason={reasonNot} onClick={() => void decide('approve')}>
          Approve and seal
        </Button>
        <Button
          tone="quiet"
          disabled={busy}
          reason={reasonNot ?? (reason.trim() === '' ? 'Give the reason first.' : null)}
          onClick={() => void decide('decline')}
        >
          Decline
        </Button>
      </div>
    </li>
  );
}
