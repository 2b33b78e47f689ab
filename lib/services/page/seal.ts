import { and, asc, desc, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { ledger, pages, signatures } from '@/db/schema';
import { now } from '@/lib/adapters/clock';
import { enqueue } from '@/lib/adapters/queue';
import type { Actor } from '@/lib/contracts/actor';
import type { PageEnvelope } from '@/lib/contracts/page';
import { sealPage } from '@/lib/record/seal';
import { writeAudit } from '../audit/write';
import { bodyOf, type OfferRow } from '../offer/view';

/**
 * Seals an offer as the job's next page, with all its signatures, and books its amount. The caller holds the job's
 * lock and has checked that every required signature is in. Answers the page's sequence.
 */
export async function sealOffer(tx: Transaction, actor: Actor, offer: OfferRow): Promise<number> {
  const { companyId, jobId } = offer;
  const body = bodyOf(offer);
  const [last] = await tx
    .select({ sequence: pages.sequence, sha256: pages.sha256 })
    .from(pages)
    .where(and(eq(pages.companyId, companyId), eq(pages.jobId, jobId)))
    .orderBy(desc(pages.sequence))
    .limit(1);
  const signed = await tx
    .select()
    .from(signatures)
    .where(and(eq(signatures.companyId, companyId), eq(signatures.offerId, offer.id)))
    .orderBy(asc(signatures.signedAt), asc(signatures.personId));
  const sequence = (last?.sequence ?? 0) + 1;
  const sealedAt = now();
  const envelope: PageEnvelope = {
    version: 1,
    job: jobId,
    sequence,
    kind: offer.kind,
    previousSha256: last?.sha256 ?? null,
    offerSha256: offer.sha256,
    signatures: signed.map((one) => ({
      personId: one.personId,
      name: one.name,
      role: one.role,
      offerSha256: one.offerSha256,
      consentSha256: one.consentSha256,
      means: one.means,
      signedAt: one.signedAt.toISOString(),
    })),
    sealedAt: sealedAt.toISOString(),
  };
  const { text, sha256 } = await sealPage(envelope);
  await tx.insert(pages).values({
    companyId,
    jobId,
    sequence,
    kind: offer.kind,
    offerId: offer.id,
    previousSha256: envelope.previousSha256,
    envelope: text,
    sha256,
    sealedAt,
  });
  await tx.insert(ledger).values({
    companyId,
    jobId,
    kind: body.kind,
    amountCents: body.sum.thisPageCents,
    pageSequence: sequence,
    memo: body.kind === 'agreement' ? 'Agreement' : `Change order ${body.order?.number ?? ''}`,
    at: sealedAt,
  });
  await writeAudit(tx, actor, { verb: 'page.seal', subject: offer.id, jobId, detail: { sequence, sha256 } });
  await enqueue(tx, 'pageSealed', { companyId, jobId, sequence });
  return sequence;
}
