import { and, desc, eq } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { payments } from '@/db/schema';
import { createRefund, PaymentServiceFault } from '@/lib/adapters/stripe';
import type { Actor } from '@/lib/contracts/actor';
import { refundInputShape } from '@/lib/contracts/payment';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { writeAudit } from '../audit/write';
import { findDraw } from './find-draw';

/**
 * Gives back all or part (in cents) of what was received for a draw. The ledger follows by webhook. Asked again
 * with the same `requestId`, nothing is given back twice.
 */
export async function refundPayment(
  actor: Actor,
  input: unknown,
): Promise<Result<{ refundId: string; amountCents: number }>> {
  const parsed = refundInputShape.safeParse(input);
  if (!parsed.success) {
    const faults = parsed.error.issues.map(({ path, message }) => ({ path: path.join('.'), message }));
    return refuse('invalid', 'The refund needs a sum and a reason.', { faults });
  }
  if (!may(actor.role, 'payment.refund')) {
    return refuse('notAllowed', reasonNot(actor.role, 'payment.refund') ?? 'This is for the owner.');
  }
  const { drawId, amountCents, reason, requestId } = parsed.data;
  const found = await withScope(actor, async (tx) => {
    const draw = await findDraw(tx, actor.companyId, drawId);
    if (!draw) return null;
    const own = and(eq(payments.companyId, actor.companyId), eq(payments.drawId, drawId));
    const [paid] = await tx
      .select({ intentId: payments.intentId })
      .from(payments)
      .where(and(own, eq(payments.status, 'succeeded')))
      .orderBy(desc(payments.createdAt))
      .limit(1);
    if (paid) {
      const detail = { intentId: paid.intentId, amountCents, reason, requestId };
      await writeAudit(tx, actor, { verb: 'payment.askRefund', subject: drawId, jobId: draw.jobId, detail });
    }
    return { account: draw.account, intentId: paid?.intentId ?? null };
  });
  if (!found) return refuse('notFound', 'There is no such payment here.');
  const { account, intentId } = found;
  if (intentId === null) return refuse('conflict', 'Nothing has been received for this payment yet.');
  try {
    const refund = await createRefund({
      account,
      intentId,
      amountCents,
      idempotencyKey: `refund/${requestId}`,
      metadata: { draw_id: drawId },
    });
    return ok({ refundId: refund.id, amountCents: refund.amountCents });
  } catch (error) {
    if (!(error instanceof PaymentServiceFault)) throw error;
    if (error.kind === 'unavailable') {
      return refuse(
        'unavailable',
        'The payment service cannot be reached just now. Please try again in a few minutes.',
      );
    }
    return refuse('conflict', 'That is more than is left of this payment.');
  }
}
