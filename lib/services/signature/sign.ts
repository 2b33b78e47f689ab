import { and, eq } from 'drizzle-orm';
import { lockJob, withScope, type Transaction } from '@/db/client';
import { offers, signatures } from '@/db/schema';
import { now } from '@/lib/adapters/clock';
import type { Actor, Guest, Worker } from '@/lib/contracts/actor';
import { faultsOf } from '@/lib/contracts/faults';
import { signatureInputShape, type OfferView } from '@/lib/contracts/offer';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { writeAudit } from '../audit/write';
import { markSigned } from '../change-order/mark-signed';
import { openSchedule } from '../draw/open-schedule';
import { renewOffer } from '../offer/renew';
import { bodyOf, viewOffer, type OfferRow } from '../offer/view';
import { sealOffer } from '../page/seal';

const NO_OFFER = 'There is no such offer here.';

/**
 * One signature under one offer. In one transaction under the job's lock: what is stored is computed again, and when
 * anything moved nothing is signed and the signer gets what moved (`moved`, with the new offer). A second press of
 * the same signer changes nothing. The last required signature seals an agreement; a change order then waits for
 * the contractor.
 */
export async function signOffer(actor: Actor, input: unknown): Promise<Result<OfferView>> {
  if (!may(actor.role, 'offer.sign') || actor.kind !== 'guest') {
    return refuse('notAllowed', reasonNot(actor.role, 'offer.sign') ?? 'This is not for you.');
  }
  const parsed = signatureInputShape.safeParse(input);
  if (!parsed.success) {
    const faults = faultsOf(parsed.error);
    const named = faults.some((fault) => fault.path === 'offerId' || fault.path === 'jobId');
    return named
      ? refuse('notFound', NO_OFFER)
      : refuse('invalid', 'A signature needs your full name and your consent.', { faults });
  }
  const { jobId, offerId, sha256, consent, means } = parsed.data;
  const { companyId } = actor;
  if (jobId !== actor.jobId) return refuse('notFound', NO_OFFER);
  const worker: Worker = { kind: 'worker', companyId };
  return withScope(worker, async (tx) => {
    await lockJob(tx, companyId, jobId);
    const [offer] = await tx
      .select()
      .from(offers)
      .where(and(eq(offers.companyId, companyId), eq(offers.jobId, jobId), eq(offers.id, offerId)));
    if (!offer) return refuse('notFound', NO_OFFER);
    const shown = await viewOffer(tx, offer);
    if (shown.sha256 !== sha256 || shown.body.consent.sha256 !== consent.sha256)
      return refuse('moved', 'What you were shown is not what is stored here. Please open the page again.', {
        detail: { offer: shown },
      });
    if (!shown.body.requiredSigners.some((signer) => signer.personId === actor.personId))
      return refuse('notAllowed', 'Your signature is not asked for on this page.');
    if (shown.state === 'sealed' || shown.signatures.some((one) => one.personId === actor.personId))
      return ok(shown);

    const renewed = await renewOffer(tx, actor, offer);
    if (!renewed.ok) return renewed;
    if (renewed.value.id !== offer.id)
      return refuse('moved', 'Something moved since you opened this. Nothing was signed.', {
        detail: { offer: renewed.value },
      });
    await tx.insert(signatures).values({
      companyId,
      jobId,
      offerId,
      personId: actor.personId,
      role: 'homeowner',
      name: shown.body.requiredSigners.find((one) => one.personId === actor.personId)?.name ?? actor.name,
      offerSha256: offer.sha256,
      consentSha256: consent.sha256,
      means,
      signedAt: now(),
    });
    await writeAudit(tx, actor, {
      verb: 'offer.sign',
      subject: offer.id,
      jobId,
      detail: { sha256, means: means.kind },
    });
    if (shown.missing.every((one) => one.personId === actor.personId)) await complete(tx, actor, offer);
    return ok(await viewOffer(tx, offer));
  });
}

/** What the last required signature does. */
async function complete(tx: Transaction, actor: Guest, offer: OfferRow): Promise<void> {
  if (offer.changeOrderId) return markSigned(tx, actor, offer.changeOrderId);
  await sealOffer(tx, actor, offer);
  await openSchedule(tx, offer.companyId, bodyOf(offer));
}
