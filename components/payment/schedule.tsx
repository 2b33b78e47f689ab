import { ButtonLink } from '@/components/ui/button';
import { Money } from '@/components/ui/money';
import { Panel } from '@/components/ui/panel';
import type { DrawView, ScheduleView } from '@/lib/contracts/payment';
import { paths } from '@/lib/paths';
import { balanceSentences, drawName, refundSentence, stateSentence } from './words';

interface Place {
  readonly company: string;
  readonly jobId: string;
  /** Whether the visitor is one who pays. */
  readonly pays: boolean;
}

/** The payments of a job in order, then what was agreed, paid and is still open, in sentences. */
export function Schedule({ schedule, ...place }: { schedule: ScheduleView } & Place) {
  const { draws, balance } = schedule;
  const [first, ...rest] = balanceSentences(balance);
  return (
    <div className="grid gap-frame lg:grid-cols-[minmax(0,2fr)_minmax(0,1fr)]">
      <Panel title="Sum to date" className="lg:order-2">
        <p className="text-lead">{first}</p>
        {rest.map((sentence) => (
          <p key={sentence} className="mt-2 text-lead">
            {sentence}
          </p>
        ))}
      </Panel>
      {draws.length === 0 ? (
        <Panel>
          <p>The schedule of payments appears here once the agreement is signed.</p>
        </Panel>
      ) : (
        <ol className="grid content-start gap-frame" aria-label="Payments">
          {draws.map((draw) => (
            <li key={draw.id}>
              <Entry draw={draw} {...place} />
            </li>
          ))}
        </ol>
      )}
    </div>
  );
}

function Entry({ draw, company, jobId, pays }: { draw: DrawView } & Place) {
  const refunded = refundSentence(draw);
  const due = draw.state === 'due' && pays;
  return (
    <Panel as="div" className={due ? 'border-l-4! border-l-brand!' : undefined}>
      <div className="flex flex-wrap items-baseline justify-between gap-x-5">
        <h2 className="font-title text-part font-semibold">{drawName(draw)}</h2>
        <p className="font-title text-part font-semibold">
          <Money cents={draw.amountCents} />
        </p>
      </div>
      <div className="mt-1 flex flex-wrap items-end justify-between gap-x-5 gap-y-3">
        <div>
          <p className="text-quiet">{draw.label}</p>
          <p>{stateSentence(draw)}</p>
          {refunded && <p>{refunded}</p>}
        </div>
        {draw.state !== 'planned' && (
          <ButtonLink href={paths.payment(company, jobId, draw.id)} tone={due ? 'primary' : 'quiet'}>
            {linkText(draw, due)}
          </ButtonLink>
        )}
      </div>
    </Panel>
  );
}

function linkText(draw: DrawView, due: boolean): string {
  if (due) return `Pay ${drawName(draw).toLowerCase()}`;
  return draw.state === 'paid' ? 'See the receipt' : 'See how it stands';
}
