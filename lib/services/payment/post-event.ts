import { and, eq } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { companies, draws, payments, webhookEvents } from '@/db/schema';
import { listRefunds, retrievePaymentIntent } from '@/lib/adapters/stripe';
import type { Worker } from '@/lib/contracts/actor';
import type { PaymentEvent } from '@/lib/contracts/payment';
import { settlePayment } from './settle';

/** What became of an event. Whatever it was, the sender need not send it again. */
export type Posted = 'posted' | 'duplicate' | 'notOurs';

/**
 * Takes one webhook event of the payment service. Its account decides the company; its content is not believed
 * but looked up again, under the draw's lock, so that what is written is never older than what was. Event id,
 * ledger, draw, audit and receipt are stored together or not at all. Throws when the service cannot be asked:
 * the sender then tries again.
 */
export async function postPaymentEvent(event: PaymentEvent): Promise<Posted> {
  const { account, intentId } = event;
  if (account === null || intentId === null) return 'notOurs';
  const company = await withScope({ kind: 'account', key: account }, async (tx) => {
    const [row] = await tx
      .select({ id: companies.id })
      .from(companies)
      .where(eq(companies.stripeAccountId, account));
    return row;
  });
  if (!company) return 'notOurs';
  const worker: Worker = { kind: 'worker', companyId: company.id };

  return withScope(worker, async (tx) => {
    const [fresh] = await tx
      .insert(webhookEvents)
      .values({ source: 'stripe', eventId: event.id, companyId: company.id, type: event.type })
      .onConflictDoNothing()
      .returning({ eventId: webhookEvents.eventId });
    if (!fresh) return 'duplicate';
    const own = and(eq(payments.companyId, company.id), eq(payments.intentId, intentId));
    const [known] = await tx.select({ drawId: payments.drawId }).from(payments).where(own);
    // An intent becomes payable only after its row is stored, so one without a row has nothing to tell.
    if (!known) return 'notOurs';
    await tx
      .select({ id: draws.id })
      .from(draws)
      .where(and(eq(draws.companyId, company.id), eq(draws.id, known.drawId)))
      .for('update');
    const [payment] = await tx.select().from(payments).where(own);
    if (!payment) return 'notOurs';
    const intent = await retrievePaymentIntent({ account, intentId });
    // A refund that failed no longer counts in the charge's sum, so its own event asks for the list too.
    const refunded =
      intent.charge !== null && (intent.charge.refundedCents > 0 || event.type.includes('refund'));
    const refunds = refunded ? await listRefunds({ account, intentId }) : [];
    await settlePayment(tx, worker, payment, intent, refunds);
    return 'posted';
  });
}
