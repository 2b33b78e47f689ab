import type { offers, pages } from '@/db/schema';
import { pageEnvelopeShape, type PageEnvelope, type PageSummary } from '@/lib/contracts/page';
import { bodyOf } from '../offer/view';

type PageRow = typeof pages.$inferSelect;

/** A moment where the company is: `Tuesday, July 7, 2026 at 4:12 PM`. */
export const momentInWords = (instant: Date, timeZone: string): string =>
  new Intl.DateTimeFormat('en-US', { dateStyle: 'full', timeStyle: 'short', timeZone }).format(instant);

/** A stored page's envelope. Throws when it is not one. */
export const envelopeOf = (page: Pick<PageRow, 'envelope'>): PageEnvelope =>
  pageEnvelopeShape.parse(JSON.parse(page.envelope));

export function summaryOf(
  page: PageRow,
  offer: Pick<typeof offers.$inferSelect, 'body'>,
  timeZone: string,
): PageSummary {
  const { sum } = bodyOf(offer);
  return {
    sequence: page.sequence,
    kind: page.kind,
    sha256: page.sha256,
    previousSha256: page.previousSha256,
    sealedOn: momentInWords(page.sealedAt, timeZone),
    sumAfterCents: sum.afterCents,
    thisPageCents: sum.thisPageCents,
    signedBy: envelopeOf(page).signatures.map((one) => one.name),
  };
}
