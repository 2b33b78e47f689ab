import { and, asc, eq, isNotNull } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { companies, draws, jobs, ledger } from '@/db/schema';
import type { DrawView } from '@/lib/contracts/payment';

interface Schedule {
  readonly jobName: string;
  readonly draws: readonly DrawView[];
}

/** The calendar date of an instant where the company is. */
export const calendarDate = (instant: Date, timeZone: string): string =>
  // The Swedish form of a date is the one of ISO 8601.
  new Intl.DateTimeFormat('sv-SE', { timeZone, dateStyle: 'short' }).format(instant);

/**
 * A job's payments in order, with what the ledger holds for each. Null when the scope shows no such job.
 */
export async function readSchedule(
  tx: Transaction,
  companyId: string,
  jobId: string,
): Promise<Schedule | null> {
  const [job] = await tx
    .select({ name: jobs.name, timeZone: companies.timeZone })
    .from(jobs)
    .innerJoin(companies, eq(companies.id, jobs.companyId))
    .where(and(eq(jobs.companyId, companyId), eq(jobs.id, jobId)));
  if (!job) return null;
  const rows = await tx
    .select()
    .from(draws)
    .where(and(eq(draws.companyId, companyId), eq(draws.jobId, jobId)))
    .orderBy(asc(draws.number));
  const entries = await tx
    .select()
    .from(ledger)
    .where(and(eq(ledger.companyId, companyId), eq(ledger.jobId, jobId), isNotNull(ledger.drawId)))
    .orderBy(asc(ledger.at));
  const views = rows.map((row): DrawView => {
    const own = entries.filter((entry) => entry.drawId === row.id);
    const sum = (...kinds: (typeof own)[number]['kind'][]) =>
      own
        .filter((entry) => kinds.includes(entry.kind))
        .reduce((total, entry) => total + entry.amountCents, 0);
    const last = own.findLast((entry) => entry.kind === 'payment');
    return {
      id: row.id,
      number: row.number,
      of: rows.length,
      label: row.label,
      due: row.due,
      amountCents: row.amountCents,
      state: row.state,
      paidOn: row.state === 'paid' && last ? calendarDate(last.at, job.timeZone) : null,
      receivedCents: 0 - sum('payment'),
      refundedCents: sum('refund', 'reversal'),
      receipt: last?.memo ?? null,
    };
  });
  return { jobName: job.name, draws: views };
}
