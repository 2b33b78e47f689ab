import { and, eq } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { offers } from '@/db/schema';
import type { Actor } from '@/lib/contracts/actor';
import { offerReferenceShape, type OfferView } from '@/lib/contracts/offer';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { viewOffer } from './view';

/** One offer with its signatures and what became of it. */
export async function readOffer(actor: Actor, input: unknown): Promise<Result<OfferView>> {
  const parsed = offerReferenceShape.safeParse(input);
  if (!parsed.success) return refuse('notFound', 'There is no such offer here.');
  if (!may(actor.role, 'offer.read')) {
    return refuse('notAllowed', reasonNot(actor.role, 'offer.read') ?? 'This is not for you.');
  }
  const { jobId, offerId } = parsed.data;
  return withScope(actor, async (tx) => {
    const [row] = await tx
      .select()
      .from(offers)
      .where(and(eq(offers.companyId, actor.companyId), eq(offers.jobId, jobId), eq(offers.id, offerId)));
    return row ? ok(await viewOffer(tx, row)) : refuse('notFound', 'There is no such offer here.');
  });
}
