import { and, desc, eq } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { draws, payments } from '@/db/schema';
import {
  cancelPaymentIntent,
  createPaymentIntent,
  PaymentServiceFault,
  publicPaymentSettings,
  retrievePaymentIntent,
} from '@/lib/adapters/stripe';
import type { Actor } from '@/lib/contracts/actor';
import {
  drawInputShape,
  type DrawView,
  type IntentSnapshot,
  type PaymentStart,
} from '@/lib/contracts/payment';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { writeAudit } from '../audit/write';
import { findDraw, type FoundDraw } from './find-draw';

type Payment = typeof payments.$inferSelect;

const NOT_PAYABLE: Readonly<Record<Exclude<DrawView['state'], 'due'>, string>> = {
  planned: 'This payment is not due yet.',
  processing: 'A payment for this is on its way. There is nothing to do until it has arrived.',
  paid: 'This payment has been received.',
};

const isPayable = (intent: IntentSnapshot) => intent.status === 'open' || intent.status === 'actionNeeded';

/**
 * Gets the card form ready for a draw that is due. However often and from however many devices it is called, a
 * draw has one payable intent: the last attempt is taken up again while it can be paid, and a new one is created
 * under a key that all callers compute alike.
 */
export async function startPayment(actor: Actor, input: unknown): Promise<Result<PaymentStart>> {
  const parsed = drawInputShape.safeParse(input);
  if (!parsed.success) return refuse('notFound', 'There is no such payment here.');
  if (actor.kind !== 'guest' || !may(actor.role, 'draw.pay')) {
    return refuse('notAllowed', reasonNot(actor.role, 'draw.pay') ?? 'This is for the homeowner.');
  }
  const { drawId } = parsed.data;
  const facts = await withScope(actor, async (tx) => {
    const found = await findDraw(tx, actor.companyId, drawId);
    if (!found) return null;
    const attempts = await tx
      .select()
      .from(payments)
      .where(and(eq(payments.companyId, actor.companyId), eq(payments.drawId, drawId)))
      .orderBy(desc(payments.createdAt));
    return { found, attempts };
  });
  if (!facts) return refuse('notFound', 'There is no such payment here.');
  const { found, attempts } = facts;
  if (found.draw.state !== 'due') return refuse('conflict', NOT_PAYABLE[found.draw.state]);

  try {
    const intent =
      (await takeUp(found, attempts[0])) ?? (await create(actor.companyId, found, attempts.length));
    if (!isPayable(intent)) return refuse('conflict', NOT_PAYABLE.processing);
    return await record(actor, found, intent);
  } catch (error) {
    if (!(error instanceof PaymentServiceFault)) throw error;
    console.error(`payment of draw ${drawId}: ${error.kind} ${error.code ?? ''} ${error.message}`);
    return refuse(
      'unavailable',
      'The payment service cannot be reached just now. Nothing was charged. Please try again in a few minutes.',
    );
  }
}

/** The last attempt's intent when it is still good, or has been paid; null when a new one is needed. */
async function takeUp(
  { account, draw }: FoundDraw,
  last: Payment | undefined,
): Promise<IntentSnapshot | null> {
  if (!last) return null;
  const intent = await retrievePaymentIntent({ account, intentId: last.intentId });
  if (intent.status === 'canceled') return null;
  if (intent.status === 'succeeded') {
    // Paid but not posted yet, unless all of it was given back and the draw fell due again.
    return intent.charge && intent.charge.refundedCents >= intent.receivedCents ? null : intent;
  }
  if (intent.amountCents === draw.amountCents || intent.status === 'processing') return intent;
  // The sum has changed since; nobody may pay the old one.
  await cancelPaymentIntent({ account, intentId: intent.id });
  return null;
}

function create(companyId: string, { account, draw, jobId, jobName }: FoundDraw, attempt: number) {
  // Whoever of the household asks, the words are the same, or the key would be refused.
  return createPaymentIntent({
    account,
    amountCents: draw.amountCents,
    drawId: draw.id,
    idempotencyKey: `draw/${draw.id}/${draw.amountCents}/${attempt}`,
    description: `${jobName}, payment ${draw.number} of ${draw.of}`,
    receiptEmail: null,
    metadata: { company_id: companyId, job_id: jobId },
  });
}

async function record(
  actor: Extract<Actor, { kind: 'guest' }>,
  { account, draw, jobId }: FoundDraw,
  intent: IntentSnapshot,
): Promise<Result<PaymentStart>> {
  return withScope(actor, async (tx) => {
    const [now] = await tx
      .select({ state: draws.state, amountCents: draws.amountCents })
      .from(draws)
      .where(and(eq(draws.companyId, actor.companyId), eq(draws.id, draw.id)))
      .for('update');
    if (!now) return refuse('notFound', 'There is no such payment here.');
    if (now.state !== 'due') return refuse('conflict', NOT_PAYABLE[now.state]);
    if (now.amountCents !== intent.amountCents) {
      return refuse('moved', 'The sum of this payment has just changed. Please look at it again.');
    }
    const [inserted] = await tx
      .insert(payments)
      .values({
        companyId: actor.companyId,
        jobId,
        drawId: draw.id,
        intentId: intent.id,
        amountCents: intent.amountCents,
        status: intent.status,
        createdBy: actor.personId,
      })
      .onConflictDoNothing({ target: [payments.companyId, payments.intentId] })
      .returning({ id: payments.id });
    if (inserted) {
      await writeAudit(tx, actor, {
        verb: 'payment.start',
        subject: draw.id,
        jobId,
        detail: { intentId: intent.id, amountCents: intent.amountCents },
      });
    }
    return ok({ draw, clientSecret: intent.clientSecret, account, ...publicPaymentSettings() });
  });
}
