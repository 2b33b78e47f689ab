import { and, desc, eq } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { changeOrders } from '@/db/schema';
import type { Actor } from '@/lib/contracts/actor';
import type { ChangeOrderRow } from '@/lib/contracts/change-order';
import { jobReferenceShape } from '@/lib/contracts/job';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { findJob } from '../job/view';
import { rowOf } from './view';

/** A job's change orders, newest first. */
export async function listChangeOrders(actor: Actor, input: unknown): Promise<Result<ChangeOrderRow[]>> {
  const parsed = jobReferenceShape.safeParse(input);
  if (!parsed.success) return refuse('notFound', 'There is no such job here.');
  if (!may(actor.role, 'changeOrder.read')) {
    return refuse('notAllowed', reasonNot(actor.role, 'changeOrder.read') ?? 'This is not for you.');
  }
  const { companyId } = actor;
  const { jobId } = parsed.data;
  return withScope(actor, async (tx) => {
    if (!(await findJob(tx, companyId, jobId))) return refuse('notFound', 'There is no such job here.');
    const rows = await tx
      .select()
      .from(changeOrders)
      .where(and(eq(changeOrders.companyId, companyId), eq(changeOrders.jobId, jobId)))
      .orderBy(desc(changeOrders.number));
    return ok(rows.map(rowOf));
  });
}
