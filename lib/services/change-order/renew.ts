import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { changeOrders, offers } from '@/db/schema';
import { now } from '@/lib/adapters/clock';
import type { Actor } from '@/lib/contracts/actor';
import type { OfferView } from '@/lib/contracts/offer';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { loadKitchen, missingSentence } from '../job/load-kitchen';
import { companyToday } from '../offer/body';
import { blockedSentence } from '../offer/prepare';
import { storeOffer, textOf } from '../offer/store';
import { bodyOf, viewOffer } from '../offer/view';
import { buildChangeOrder } from './body';
import { findDraws, NO_ORDER, sealedBodies } from './find';

/**
 * An open order's offer as the stored facts make it now: the same one when nothing moved; else a new one, and the
 * order waits for the household again. The caller holds the job's lock, in a staff or worker scope.
 */
export async function renewChangeOrder(
  tx: Transaction,
  actor: Actor,
  orderId: string,
): Promise<Result<OfferView>> {
  const { companyId } = actor;
  const own = and(eq(changeOrders.companyId, companyId), eq(changeOrders.id, orderId));
  const [order] = await tx.select().from(changeOrders).where(own);
  if (!order) return refuse('notFound', NO_ORDER);
  const { jobId } = order;
  if (order.state !== 'draft' && order.state !== 'offered' && order.state !== 'signed')
    return refuse('conflict', `This change order is ${order.state}; nothing more can be signed on it.`);
  const kitchen = await loadKitchen(tx, companyId, jobId);
  if (!kitchen) return refuse('notFound', NO_ORDER);
  if ('missing' in kitchen) return refuse('conflict', missingSentence(kitchen.missing));
  const [offer] = order.offerId
    ? await tx
        .select()
        .from(offers)
        .where(and(eq(offers.companyId, companyId), eq(offers.id, order.offerId)))
    : [];
  const preparedOn = offer ? bodyOf(offer).preparedOn : companyToday(kitchen);
  const sealed = await sealedBodies(tx, companyId, jobId);
  const schedule = await findDraws(tx, companyId, jobId);
  const built = await buildChangeOrder(tx, kitchen, order, sealed, schedule, preparedOn);
  if (!built.ok) return built;
  const blocked = blockedSentence(built.value.takeoff);
  if (blocked) return refuse('conflict', blocked);
  const { body } = built.value;
  const text = textOf(body);
  if (offer && offer.sha256 === text.sha256) return ok(await viewOffer(tx, offer));
  const row = await storeOffer(tx, {
    companyId,
    body,
    text,
    schemeId: null,
    changeOrderId: order.id,
    replaces: offer?.id ?? null,
    createdBy: actor.personId,
  });
  await tx
    .update(changeOrders)
    .set({
      offerId: row.id,
      state: 'offered',
      baseSequence: body.order?.basedOn ?? order.baseSequence,
      amountCents: body.sum.thisPageCents,
      updatedAt: now(),
    })
    .where(own);
  return ok(await viewOffer(tx, row));
}
