import Link from 'next/link';
import { ButtonLink } from '@/components/ui/button';
import { PageTitle } from '@/components/ui/frame';
import { Money } from '@/components/ui/money';
import { Panel } from '@/components/ui/panel';
import { Telephone } from '@/components/ui/telephone';
import type { JobView } from '@/lib/contracts/job';
import type { Balance } from '@/lib/contracts/payment';
import type { NextStep } from './next-step';
import { StageRule } from './stage-rule';

export interface Address {
  readonly href: string;
  readonly label: string;
  readonly about: string;
}

/** Where a job stands, what is next, whom to ask. */
export function JobOverview({
  job,
  next,
  nextHref,
  estimateCents,
  balance,
  phone,
  contractor,
  rooms,
}: {
  job: JobView;
  next: NextStep;
  nextHref: string | null;
  /** Total of the household's newest scheme, before anything is signed; integer cents. */
  estimateCents: number | null;
  balance: Balance | null;
  phone: string;
  contractor: string;
  /** The other pages of the job. */
  rooms: readonly Address[];
}) {
  const signed = balance !== null && balance.agreedCents > 0;
  return (
    <>
      <PageTitle about={`${job.address}. Job ${job.number}.`}>{job.name}</PageTitle>
      <Panel className="grid gap-5 md:grid-cols-[1fr_auto] md:items-end md:py-8!">
        <div className="max-w-prose">
          <p className="text-quiet">Next</p>
          <h2 className="font-title text-page font-semibold">{next.title}</h2>
          <p className="mt-1 text-lead">{next.sentence}</p>
        </div>
        {nextHref && next.action && (
          <ButtonLink href={nextHref} className="text-lead!">
            {next.action}
          </ButtonLink>
        )}
      </Panel>
      <Panel>
        <h2 className="sr-only">Stage</h2>
        <StageRule stage={job.stage} />
      </Panel>
      <div className="grid gap-frame md:grid-cols-3">
        <Panel title="The sum">
          {signed ? (
            <>
              <p className="font-title text-page font-semibold tabular-nums">
                <Money cents={balance.agreedCents + balance.changesCents} />
              </p>
              <p className="text-quiet">
                agreed to date; <Money cents={balance.paidCents - balance.refundedCents} /> paid
              </p>
            </>
          ) : estimateCents === null ? (
            <p className="text-quiet">It appears here with the first proposal.</p>
          ) : (
            <>
              <p className="font-title text-page font-semibold tabular-nums">
                <Money cents={estimateCents} />
              </p>
              <p className="text-quiet">as chosen now. Nothing is owed before you sign.</p>
            </>
          )}
        </Panel>
        <Panel title="Whom to ask" className="md:col-span-2">
          <p className="text-lead">
            <span className="font-semibold">{job.salesperson.name}</span>, {contractor}
          </p>
          <p className="text-lead">
            <Telephone
              phone={phone}
              className="inline-flex min-h-target items-center font-semibold underline"
            />
          </p>
          <p>
            <a
              href={`mailto:${job.salesperson.email}`}
              className="inline-flex min-h-target items-center break-all underline"
            >
              {job.salesperson.email}
            </a>
          </p>
        </Panel>
      </div>
      <nav aria-label="Pages of this job">
        <ul className="grid gap-frame sm:grid-cols-2 lg:grid-cols-4">
          {rooms.map((room) => (
            <li key={room.href} className="grid">
              <Link
                href={room.href}
                className="grid content-start gap-1 rounded-frame border border-hairline bg-panel p-3 no-underline hover:border-ink md:p-5"
              >
                <span className="font-title text-lead font-semibold text-brand underline">{room.label}</span>
                <span className="text-note text-quiet">{room.about}</span>
              </Link>
            </li>
          ))}
        </ul>
      </nav>
    </>
  );
}
