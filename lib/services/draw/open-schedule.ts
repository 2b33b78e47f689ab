import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { draws, jobs } from '@/db/schema';
import type { OfferBody } from '@/lib/contracts/offer';

/** The payments of a sealed agreement, the first one due, and the job at Signed. The caller holds the job's lock. */
export async function openSchedule(tx: Transaction, companyId: string, body: OfferBody): Promise<void> {
  await tx.insert(draws).values(
    body.schedule.map((draw) => ({
      companyId,
      jobId: body.job.id,
      number: draw.number,
      label: draw.label,
      due: draw.due,
      amountCents: draw.amountCents,
      state: draw.due === 'signing' ? ('due' as const) : ('planned' as const),
    })),
  );
  await tx
    .update(jobs)
    .set({ stage: 'signed' })
    .where(and(eq(jobs.companyId, companyId), eq(jobs.id, body.job.id)));
}
