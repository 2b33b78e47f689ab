import { and, eq } from 'drizzle-orm';
import { lockJob, withScope } from '@/db/client';
import { changeOrders } from '@/db/schema';
import { now } from '@/lib/adapters/clock';
import type { Actor } from '@/lib/contracts/actor';
import { changeOrderReferenceShape, type ChangeOrderRow } from '@/lib/contracts/change-order';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { canMove, CHANGE_ORDER_NEXT } from '@/lib/contracts/states';
import { writeAudit } from '../audit/write';
import { findOrder, NO_ORDER } from './find';
import { rowOf } from './view';

/** Takes an open change order back; the household its own, the staff the contractor's. No trace stays in the sum. */
export async function withdrawChangeOrder(actor: Actor, input: unknown): Promise<Result<ChangeOrderRow>> {
  const parsed = changeOrderReferenceShape.safeParse(input);
  if (!parsed.success) return refuse('notFound', NO_ORDER);
  if (!may(actor.role, 'changeOrder.withdraw')) {
    return refuse('notAllowed', reasonNot(actor.role, 'changeOrder.withdraw') ?? 'This is not for you.');
  }
  const { jobId, orderId } = parsed.data;
  const { companyId } = actor;
  return withScope(actor, async (tx) => {
    await lockJob(tx, companyId, jobId);
    const order = await findOrder(tx, companyId, jobId, orderId);
    if (!order) return refuse('notFound', NO_ORDER);
    if ((actor.kind === 'guest') !== (order.startedBy === 'homeowner'))
      return refuse('notAllowed', 'Only the side that asked for a change takes it back.');
    if (order.state === 'withdrawn') return ok(rowOf(order));
    if (!canMove(CHANGE_ORDER_NEXT, order.state, 'withdrawn'))
      return refuse('conflict', `This change order is ${order.state} already.`);
    const [saved] = await tx
      .update(changeOrders)
      .set({ state: 'withdrawn', updatedAt: now() })
      .where(and(eq(changeOrders.companyId, companyId), eq(changeOrders.id, orderId)))
      .returning();
    if (!saved) throw new Error('The change order was not stored.');
    await writeAudit(tx, actor, { verb: 'changeOrder.withdraw', subject: orderId, jobId, detail: {} });
    return ok(rowOf(saved));
  });
}
