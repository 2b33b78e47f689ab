import { and, desc, eq } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { payments } from '@/db/schema';
import { PaymentServiceFault, retrievePaymentIntent } from '@/lib/adapters/stripe';
import type { Actor } from '@/lib/contracts/actor';
import { declineSentence, drawInputShape, type PaymentView } from '@/lib/contracts/payment';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { findDraw } from './find-draw';

/**
 * How a draw and its newest attempt stand, the attempt as the payment service has it at this moment. It is what
 * a browser asks that lost sight of its payment. The draw itself changes by webhooks alone.
 */
export async function readPayment(actor: Actor, input: unknown): Promise<Result<PaymentView>> {
  const parsed = drawInputShape.safeParse(input);
  if (!parsed.success) return refuse('notFound', 'There is no such payment here.');
  if (!may(actor.role, 'draw.read')) {
    return refuse('notAllowed', reasonNot(actor.role, 'draw.read') ?? 'This is not for you.');
  }
  const { drawId } = parsed.data;
  const facts = await withScope(actor, async (tx) => {
    const found = await findDraw(tx, actor.companyId, drawId);
    if (!found) return null;
    const [last] = await tx
      .select({ intentId: payments.intentId })
      .from(payments)
      .where(and(eq(payments.companyId, actor.companyId), eq(payments.drawId, drawId)))
      .orderBy(desc(payments.createdAt))
      .limit(1);
    return { ...found, intentId: last?.intentId ?? null };
  });
  if (!facts) return refuse('notFound', 'There is no such payment here.');
  const { account, draw, intentId } = facts;
  if (intentId === null) return ok({ draw, attempt: null });
  try {
    const { status, decline } = await retrievePaymentIntent({ account, intentId });
    const sentence = decline && status === 'open' ? declineSentence(decline.code, decline.declineCode) : null;
    return ok({ draw, attempt: { status, decline: sentence } });
  } catch (error) {
    if (!(error instanceof PaymentServiceFault)) throw error;
    return refuse(
      'unavailable',
      'The payment service cannot be reached just now. Please try again in a moment.',
    );
  }
}
