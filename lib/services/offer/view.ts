import { and, asc, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { offers, pages, signatures } from '@/db/schema';
import { offerBodyShape, type OfferBody, type OfferView } from '@/lib/contracts/offer';
import { describeDifferences } from './differences';

export type OfferRow = typeof offers.$inferSelect;

/** A stored offer's body. Throws when it is not one. */
export const bodyOf = (offer: Pick<OfferRow, 'body'>): OfferBody =>
  offerBodyShape.parse(JSON.parse(offer.body));

/** An offer with its signatures and what became of it. */
export async function viewOffer(tx: Transaction, offer: OfferRow): Promise<OfferView> {
  const { companyId, jobId } = offer;
  const here = and(eq(offers.companyId, companyId), eq(offers.jobId, jobId));
  const [successor] = await tx
    .select({ id: offers.id })
    .from(offers)
    .where(and(here, eq(offers.replaces, offer.id)))
    .orderBy(asc(offers.createdAt))
    .limit(1);
  const [before] = offer.replaces
    ? await tx
        .select()
        .from(offers)
        .where(and(here, eq(offers.id, offer.replaces)))
    : [];
  const signed = await tx
    .select({ personId: signatures.personId, name: signatures.name, signedAt: signatures.signedAt })
    .from(signatures)
    .where(and(eq(signatures.companyId, companyId), eq(signatures.offerId, offer.id)))
    .orderBy(asc(signatures.signedAt));
  const [page] = await tx
    .select({ sequence: pages.sequence })
    .from(pages)
    .where(and(eq(pages.companyId, companyId), eq(pages.offerId, offer.id)));
  const body = bodyOf(offer);
  return {
    id: offer.id,
    sha256: offer.sha256,
    body,
    state: page ? 'sealed' : successor ? 'replaced' : 'current',
    replacedBy: successor?.id ?? null,
    differences: before ? describeDifferences(bodyOf(before), body) : [],
    signatures: signed.map((one) => ({ ...one, signedAt: one.signedAt.toISOString() })),
    missing: body.requiredSigners
      .filter((signer) => !signed.some((one) => one.personId === signer.personId))
      .map(({ personId, name }) => ({ personId, name })),
    sealedSequence: page?.sequence ?? null,
  };
}
