import type { Transaction } from '@/db/client';
import { offers } from '@/db/schema';
import { now } from '@/lib/adapters/clock';
import { sha256 } from '@/lib/adapters/ids';
import type { OfferBody } from '@/lib/contracts/offer';
import { canonicalJson } from '@/lib/record/canonical';
import type { OfferRow } from './view';

export interface OfferText {
  readonly text: string;
  readonly sha256: string;
}

/** The very text that is shown, stored and hashed. */
export function textOf(body: OfferBody): OfferText {
  const text = canonicalJson(body);
  return { text, sha256: sha256(text) };
}

/** Stores an offer; its text is never rebuilt. */
export async function storeOffer(
  tx: Transaction,
  {
    body,
    text,
    ...rest
  }: {
    readonly companyId: string;
    readonly body: OfferBody;
    readonly text: OfferText;
    readonly schemeId: string | null;
    readonly changeOrderId: string | null;
    readonly replaces: string | null;
    readonly createdBy: string;
  },
): Promise<OfferRow> {
  const [row] = await tx
    .insert(offers)
    .values({
      ...rest,
      jobId: body.job.id,
      kind: body.kind,
      body: text.text,
      sha256: text.sha256,
      totalCents: body.sum.afterCents,
      createdAt: now(),
    })
    .returning();
  if (!row) throw new Error('The offer was not stored.');
  return row;
}
