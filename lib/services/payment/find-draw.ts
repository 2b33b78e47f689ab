import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { companies, draws } from '@/db/schema';
import type { DrawView } from '@/lib/contracts/payment';
import { readSchedule } from '../draw/schedule';

export interface FoundDraw {
  readonly draw: DrawView;
  readonly jobId: string;
  readonly jobName: string;
  /** The company's connected account at the payment service. */
  readonly account: string;
}

/** A draw with its job and its company's account. Null when the scope does not show it. */
export async function findDraw(
  tx: Transaction,
  companyId: string,
  drawId: string,
): Promise<FoundDraw | null> {
  const [row] = await tx
    .select({ jobId: draws.jobId, account: companies.stripeAccountId })
    .from(draws)
    .innerJoin(companies, eq(companies.id, draws.companyId))
    .where(and(eq(draws.companyId, companyId), eq(draws.id, drawId)));
  if (!row) return null;
  const schedule = await readSchedule(tx, companyId, row.jobId);
  const draw = schedule?.draws.find((one) => one.id === drawId);
  return schedule && draw ? { ...row, draw, jobName: schedule.jobName } : null;
}
