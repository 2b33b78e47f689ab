import { withScope } from '@/db/client';
import type { Actor } from '@/lib/contracts/actor';
import type { OfferBody } from '@/lib/contracts/offer';
import { pageReferenceShape, type PageSummary } from '@/lib/contracts/page';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { bodyOf } from '../offer/view';
import { findPages } from './find';
import { envelopeOf, momentInWords, summaryOf } from './view';

export interface PageView {
  readonly summary: PageSummary;
  readonly body: OfferBody;
  readonly signatures: readonly {
    readonly name: string;
    readonly role: string;
    readonly signedAtText: string;
  }[];
}

/** One sealed page as it was signed. */
export async function readPage(actor: Actor, input: unknown): Promise<Result<PageView>> {
  const parsed = pageReferenceShape.safeParse(input);
  if (!parsed.success) return refuse('notFound', 'There is no such page here.');
  if (!may(actor.role, 'book.read')) {
    return refuse('notAllowed', reasonNot(actor.role, 'book.read') ?? 'This is not for you.');
  }
  const { jobId, sequence } = parsed.data;
  const found = await withScope(actor, (tx) => findPages(tx, actor.companyId, jobId));
  const row = found?.rows.find(({ page }) => page.sequence === sequence);
  if (!found || !row) return refuse('notFound', 'There is no such page here.');
  return ok({
    summary: summaryOf(row.page, row.offer, found.timeZone),
    body: bodyOf(row.offer),
    signatures: envelopeOf(row.page).signatures.map((one) => ({
      name: one.name,
      role: one.role,
      signedAtText: momentInWords(new Date(one.signedAt), found.timeZone),
    })),
  });
}
