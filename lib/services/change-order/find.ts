import { and, asc, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { changeOrders, draws, offers, pages } from '@/db/schema';
import type { OfferBody } from '@/lib/contracts/offer';
import { bodyOf, type OfferRow } from '../offer/view';

export type OrderRow = typeof changeOrders.$inferSelect;
export type DrawRow = typeof draws.$inferSelect;

export const NO_ORDER = 'There is no such change order here.';

export async function findOrder(
  tx: Transaction,
  companyId: string,
  jobId: string,
  orderId: string,
): Promise<OrderRow | undefined> {
  const [row] = await tx
    .select()
    .from(changeOrders)
    .where(
      and(eq(changeOrders.companyId, companyId), eq(changeOrders.jobId, jobId), eq(changeOrders.id, orderId)),
    );
  return row;
}

/** The sealed pages that say what is agreed, in order. */
export async function sealedBodies(
  tx: Transaction,
  companyId: string,
  jobId: string,
): Promise<{ readonly sequence: number; readonly body: OfferBody; readonly offer: OfferRow }[]> {
  const rows = await tx
    .select({ sequence: pages.sequence, offer: offers })
    .from(pages)
    .innerJoin(offers, and(eq(offers.companyId, pages.companyId), eq(offers.id, pages.offerId)))
    .where(and(eq(pages.companyId, companyId), eq(pages.jobId, jobId)))
    .orderBy(asc(pages.sequence));
  return rows.map(({ sequence, offer }) => ({ sequence, offer, body: bodyOf(offer) }));
}

export const findDraws = (tx: Transaction, companyId: string, jobId: string): Promise<DrawRow[]> =>
  tx
    .select()
    .from(draws)
    .where(and(eq(draws.companyId, companyId), eq(draws.jobId, jobId)))
    .orderBy(asc(draws.number));
