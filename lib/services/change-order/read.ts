import { and, eq } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { offers } from '@/db/schema';
import type { Actor } from '@/lib/contracts/actor';
import { changeOrderReferenceShape, type ChangeOrderView } from '@/lib/contracts/change-order';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { viewOffer } from '../offer/view';
import { findOrder, NO_ORDER } from './find';
import { rowOf } from './view';

/** One change order with the offer that its signers see now. */
export async function readChangeOrder(actor: Actor, input: unknown): Promise<Result<ChangeOrderView>> {
  const parsed = changeOrderReferenceShape.safeParse(input);
  if (!parsed.success) return refuse('notFound', NO_ORDER);
  if (!may(actor.role, 'changeOrder.read')) {
    return refuse('notAllowed', reasonNot(actor.role, 'changeOrder.read') ?? 'This is not for you.');
  }
  const { jobId, orderId } = parsed.data;
  const { companyId } = actor;
  return withScope(actor, async (tx) => {
    const order = await findOrder(tx, companyId, jobId, orderId);
    if (!order?.offerId) return refuse('notFound', NO_ORDER);
    const [offer] = await tx
      .select()
      .from(offers)
      .where(and(eq(offers.companyId, companyId), eq(offers.id, order.offerId)));
    if (!offer) return refuse('notFound', NO_ORDER);
    return ok({ ...rowOf(order), offer: await viewOffer(tx, offer) });
  });
}
