import { z } from 'zod';
import { withScope } from '@/db/client';
import type { Actor } from '@/lib/contracts/actor';
import type { ScheduleView } from '@/lib/contracts/payment';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { sumLedger } from '../ledger/balance';
import { readSchedule } from './schedule';

const inputShape = z.object({ jobId: z.uuid() });

/** A job's schedule of payments and what its ledger adds up to, for homeowner and staff. */
export async function listDraws(actor: Actor, input: unknown): Promise<Result<ScheduleView>> {
  const parsed = inputShape.safeParse(input);
  if (!parsed.success) return refuse('notFound', 'There is no such job here.');
  if (!may(actor.role, 'draw.read')) {
    return refuse('notAllowed', reasonNot(actor.role, 'draw.read') ?? 'This is not for you.');
  }
  const { jobId } = parsed.data;
  return withScope(actor, async (tx) => {
    const schedule = await readSchedule(tx, actor.companyId, jobId);
    if (!schedule) return refuse('notFound', 'There is no such job here.');
    const balance = await sumLedger(tx, actor.companyId, jobId);
    return ok({ jobName: schedule.jobName, draws: [...schedule.draws], balance });
  });
}
