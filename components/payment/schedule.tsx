import Link from 'next/link';
import type { DrawView, ScheduleView } from '@/lib/contracts/payment';
import { Panel } from '@/components/ui/panel';
import { paths } from '@/lib/paths';
import { balanceSentences, drawName, formatCents, refundSentence, stateSentence } from './words';

function linkText(draw: DrawView, pays: boolean): string {
  if (draw.state === 'paid') return 'See the receipt';
  return draw.state === 'due' && pays ? `Pay ${drawName(draw).toLowerCase()}` : 'See how it stands';
}

/** The payments of a job in order, then what was agreed, paid and is still open, in sentences. */
export function Schedule({
  schedule,
  company,
  jobId,
  pays,
}: {
  schedule: ScheduleView;
  company: string;
  jobId: string;
  /** Whether the visitor is one who pays. */
  pays: boolean;
}) {
  const { draws, balance } = schedule;
  return (
    <div className="grid gap-frame">
      <Panel>
        <h2 className="sr-only">Sum to date</h2>
        {balanceSentences(balance).map((sentence) => (
          <p key={sentence} className="text-lead">
            {sentence}
          </p>
        ))}
      </Panel>
      {draws.length === 0 ? (
        <Panel>
          <p>The schedule of payments appears here once the agreement is signed.</p>
        </Panel>
      ) : (
        <ol className="grid gap-frame" aria-label="Payments">
          {draws.map((draw) => (
            <li key={draw.id}>
              <Panel>
                <div className="flex flex-wrap items-baseline justify-between gap-x-5">
                  <h2 className="font-title text-part">{drawName(draw)}</h2>
                  <p className="font-title text-part tabular-nums">{formatCents(draw.amountCents)}</p>
                </div>
                <p className="text-quiet">{draw.label}</p>
                <p>{stateSentence(draw)}</p>
                {refundSentence(draw) && <p>{refundSentence(draw)}</p>}
                {draw.state !== 'planned' && (
                  <Link href={paths.payment(company, jobId, draw.id)}>{linkText(draw, pays)}</Link>
                )}
              </Panel>
            </li>
          ))}
        </ol>
      )}
    </div>
  );
}
