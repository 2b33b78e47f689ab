import { and, eq, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { draws, ledger, payments } from '@/db/schema';
import { enqueue } from '@/lib/adapters/queue';
import type { Worker } from '@/lib/contracts/actor';
import { drawName, type IntentSnapshot, type RefundSnapshot } from '@/lib/contracts/payment';
import { canMove, DRAW_NEXT, type DrawState } from '@/lib/contracts/states';
import { writeAudit } from '../audit/write';
import { readSchedule } from '../draw/schedule';

type Payment = typeof payments.$inferSelect;

/**
 * Brings payment, ledger and draw to what the payment service holds. It only ever adds what is missing, so any
 * number of calls in any order end the same; the caller holds the draw's lock and read `intent` under it.
 */
export async function settlePayment(
  tx: Transaction,
  worker: Worker,
  payment: Payment,
  intent: IntentSnapshot,
  refunds: readonly RefundSnapshot[],
): Promise<void> {
  const schedule = await readSchedule(tx, worker.companyId, payment.jobId);
  const draw = schedule?.draws.find((one) => one.id === payment.drawId);
  if (!draw) throw new Error(`Payment ${payment.id} has no draw.`);
  const name = drawName(draw);
  const entry = { companyId: worker.companyId, jobId: payment.jobId, drawId: payment.drawId };

  const post = async (
    row: Pick<typeof ledger.$inferInsert, 'kind' | 'amountCents' | 'memo' | 'at'> & { externalId: string },
  ) => {
    const [inserted] = await tx
      .insert(ledger)
      .values({ ...entry, ...row })
      .onConflictDoNothing({ target: [ledger.companyId, ledger.kind, ledger.externalId] })
      .returning({ id: ledger.id });
    if (!inserted) return null;
    await writeAudit(tx, worker, {
      verb: `payment.${row.kind}`,
      subject: payment.drawId,
      jobId: payment.jobId,
      detail: { intentId: intent.id, externalId: row.externalId, amountCents: row.amountCents },
    });
    return inserted.id;
  };

  const { charge } = intent;
  if (charge && intent.receivedCents > 0) {
    const by = charge.by ? `, ${charge.by.name} ending in ${charge.by.lastFour}` : '';
    const posted = await post({
      kind: 'payment',
      amountCents: -intent.receivedCents,
      externalId: charge.id,
      memo: `${name}${by}`,
      at: charge.at,
    });
    if (posted) await enqueue(tx, 'paymentReceipt', { companyId: worker.companyId, ledgerId: posted });
  }
  for (const refund of refunds) {
    const failed = refund.status === 'failed' || refund.status === 'canceled';
    const given = { externalId: refund.id, at: refund.at };
    if (!failed) {
      const memo = `Refund of ${name.toLowerCase()}`;
      await post({ ...given, kind: 'refund', amountCents: refund.amountCents, memo });
    } else if (await hasEntry(tx, worker.companyId, 'refund', refund.id)) {
      const memo = `Refund of ${name.toLowerCase()} did not go through`;
      await post({ ...given, kind: 'reversal', amountCents: -refund.amountCents, memo });
    }
  }

  if (payment.status !== intent.status) {
    await tx
      .update(payments)
      .set({ status: intent.status, updatedAt: sql`now()` })
      .where(and(eq(payments.companyId, worker.companyId), eq(payments.id, payment.id)));
  }
  const next = await nextState(tx, worker.companyId, payment.drawId, draw.state, intent);
  if (next !== draw.state) {
    // Money for a payment that was put off meanwhile makes it due and paid in one go.
    const direct = canMove(DRAW_NEXT, draw.state, next);
    if (!direct && !(canMove(DRAW_NEXT, draw.state, 'due') && canMove(DRAW_NEXT, 'due', next))) {
      throw new Error(`Draw ${payment.drawId} cannot go from ${draw.state} to ${next}.`);
    }
    await tx
      .update(draws)
      .set({ state: next, updatedAt: sql`now()` })
      .where(and(eq(draws.companyId, worker.companyId), eq(draws.id, payment.drawId)));
    await writeAudit(tx, worker, {
      verb: 'draw.move',
      subject: payment.drawId,
      jobId: payment.jobId,
      detail: { from: draw.state, to: next, intentId: intent.id },
    });
  }
}

async function hasEntry(
  tx: Transaction,
  companyId: string,
  kind: 'refund',
  externalId: string,
): Promise<boolean> {
  const found = await tx
    .select({ id: ledger.id })
    .from(ledger)
    .where(and(eq(ledger.companyId, companyId), eq(ledger.kind, kind), eq(ledger.externalId, externalId)));
  return found.length > 0;
}

/** A draw is paid while the ledger holds money for it, and falls due again when all of it was given back. */
async function nextState(
  tx: Transaction,
  companyId: string,
  drawId: string,
  state: DrawState,
  intent: IntentSnapshot,
): Promise<DrawState> {
  const entries = await tx
    .select({ amountCents: ledger.amountCents })
    .from(ledger)
    .where(and(eq(ledger.companyId, companyId), eq(ledger.drawId, drawId)));
  const held = 0 - entries.reduce((total, entry) => total + entry.amountCents, 0);
  if (held > 0) return 'paid';
  if (intent.status === 'processing') return state === 'paid' ? 'paid' : 'processing';
  return state === 'planned' ? 'planned' : 'due';
}
