import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { schemes } from '@/db/schema';
import type { Actor } from '@/lib/contracts/actor';
import type { OfferView } from '@/lib/contracts/offer';
import { refuse, type Result } from '@/lib/contracts/result';
import { renewChangeOrder } from '../change-order/renew';
import { loadKitchen, missingSentence } from '../job/load-kitchen';
import { newestAgreement, NO_JOB, renewAgreement } from './prepare';
import type { OfferRow } from './view';

/**
 * An offer as the stored facts make it now: the same one when nothing moved, else the one that takes its place. The
 * caller holds the job's lock, in a staff or worker scope.
 */
export async function renewOffer(tx: Transaction, actor: Actor, offer: OfferRow): Promise<Result<OfferView>> {
  if (offer.changeOrderId) return renewChangeOrder(tx, actor, offer.changeOrderId);
  const { companyId, jobId } = offer;
  const kitchen = await loadKitchen(tx, companyId, jobId);
  if (!kitchen) return refuse('notFound', NO_JOB);
  if ('missing' in kitchen) return refuse('conflict', missingSentence(kitchen.missing));
  const newest = await newestAgreement(tx, companyId, jobId);
  const schemeId = newest?.schemeId ?? offer.schemeId;
  const [scheme] = schemeId
    ? await tx
        .select()
        .from(schemes)
        .where(and(eq(schemes.companyId, companyId), eq(schemes.id, schemeId)))
    : [];
  if (!scheme) return refuse('notFound', 'There is no such scheme here.');
  return renewAgreement(tx, actor, kitchen, scheme, newest);
}
