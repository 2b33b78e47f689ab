import { and, eq, isNull } from 'drizzle-orm';
import { lockJob, withScope, type Transaction } from '@/db/client';
import { changeOrders, companies, draws, guests, jobs, offers, people, signatures } from '@/db/schema';
import { now } from '@/lib/adapters/clock';
import { environment } from '@/lib/adapters/environment';
import { enqueue } from '@/lib/adapters/queue';
import type { Actor } from '@/lib/contracts/actor';
import { decisionInputShape, type ChangeOrderRow } from '@/lib/contracts/change-order';
import { faultsOf } from '@/lib/contracts/faults';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { paths } from '@/lib/paths';
import { writeAudit } from '../audit/write';
import { bodyOf } from '../offer/view';
import { sealOffer } from '../page/seal';
import { findDraws, findOrder, NO_ORDER, type OrderRow } from './find';
import { renewChangeOrder } from './renew';
import { rowOf } from './view';

/**
 * The owner's yes or no to a signed change order. A yes seals the next page, books the amount and shares it over
 * the payments; a no needs a reason, which the household reads, and leaves no trace in the sum.
 */
export async function decideChangeOrder(actor: Actor, input: unknown): Promise<Result<ChangeOrderRow>> {
  if (!may(actor.role, 'changeOrder.decide') || actor.kind !== 'member') {
    return refuse('notAllowed', reasonNot(actor.role, 'changeOrder.decide') ?? 'This is not for you.');
  }
  const parsed = decisionInputShape.safeParse(input);
  if (!parsed.success) {
    const faults = faultsOf(parsed.error);
    return faults.some((fault) => fault.path === 'jobId' || fault.path === 'orderId')
      ? refuse('notFound', NO_ORDER)
      : refuse('invalid', faults[0]?.message ?? 'This could not be read.', { faults });
  }
  const { jobId, orderId, decision, reason } = parsed.data;
  const { companyId } = actor;
  return withScope(actor, async (tx) => {
    await lockJob(tx, companyId, jobId);
    const order = await findOrder(tx, companyId, jobId, orderId);
    if (!order) return refuse('notFound', NO_ORDER);
    if (order.state !== 'signed') return refuse('conflict', notWaiting(order));
    if (decision === 'decline') return ok(await close(tx, actor, order, 'declined', reason));

    const renewed = await renewChangeOrder(tx, actor, orderId);
    if (!renewed.ok) return renewed;
    if (renewed.value.id !== order.offerId) {
      // Kept: the new offer and the order's way back to the household.
      return refuse(
        'moved',
        'Something moved since the household signed, so the order went back to be signed anew. Nothing was approved.',
        { detail: { offer: renewed.value } },
      );
    }
    const [offer] = await tx
      .select()
      .from(offers)
      .where(and(eq(offers.companyId, companyId), eq(offers.id, renewed.value.id)));
    if (!offer) throw new Error('The offer is gone.');
    await tx.insert(signatures).values({
      companyId,
      jobId,
      offerId: offer.id,
      personId: actor.personId,
      role: 'contractor',
      name: actor.name,
      offerSha256: offer.sha256,
      consentSha256: renewed.value.body.consent.sha256,
      means: { kind: 'typed', text: actor.name },
      signedAt: now(),
    });
    await sealOffer(tx, actor, offer);
    await applySchedule(tx, companyId, jobId, bodyOf(offer).schedule);
    return ok(await close(tx, actor, order, 'approved', reason));
  });
}

function notWaiting(order: OrderRow): string {
  switch (order.state) {
    case 'approved':
      return 'This change order was approved already.';
    case 'declined':
      return 'This change order was declined already.';
    case 'withdrawn':
      return 'The household took this change order back.';
    default:
      return 'The household has not signed this change order yet.';
  }
}

async function applySchedule(
  tx: Transaction,
  companyId: string,
  jobId: string,
  schedule: readonly { readonly number: number; readonly amountCents: number }[],
): Promise<void> {
  for (const draw of await findDraws(tx, companyId, jobId)) {
    const after = schedule.find((one) => one.number === draw.number);
    if (!after || after.amountCents === draw.amountCents) continue;
    await tx
      .update(draws)
      .set({ amountCents: after.amountCents, updatedAt: now() })
      .where(and(eq(draws.companyId, companyId), eq(draws.id, draw.id)));
  }
}

async function close(
  tx: Transaction,
  actor: Actor,
  order: OrderRow,
  state: 'approved' | 'declined',
  reason: string,
): Promise<ChangeOrderRow> {
  const at = now();
  const [saved] = await tx
    .update(changeOrders)
    .set({
      state,
      decidedBy: actor.personId,
      decisionReason: reason === '' ? null : reason,
      decidedAt: at,
      updatedAt: at,
    })
    .where(and(eq(changeOrders.companyId, order.companyId), eq(changeOrders.id, order.id)))
    .returning();
  if (!saved) throw new Error('The change order was not stored.');
  await writeAudit(tx, actor, {
    verb: state === 'approved' ? 'changeOrder.approve' : 'changeOrder.decline',
    subject: order.id,
    jobId: order.jobId,
    detail: { reason, amountCents: order.amountCents },
  });
  if (state === 'declined') await tellHousehold(tx, order, reason);
  return rowOf(saved);
}

async function tellHousehold(tx: Transaction, order: OrderRow, reason: string): Promise<void> {
  const { companyId, jobId } = order;
  const [job] = await tx
    .select({ name: jobs.name, company: companies })
    .from(jobs)
    .innerJoin(companies, eq(companies.id, jobs.companyId))
    .where(and(eq(jobs.companyId, companyId), eq(jobs.id, jobId)));
  if (!job) throw new Error('The job is gone.');
  const household = await tx
    .select({ name: people.name, email: people.email })
    .from(guests)
    .innerJoin(people, and(eq(people.companyId, guests.companyId), eq(people.id, guests.personId)))
    .where(and(eq(guests.companyId, companyId), eq(guests.jobId, jobId), isNull(guests.revokedAt)));
  for (const to of household)
    await enqueue(tx, 'mail', {
      companyId,
      to,
      subject: `Change order ${order.number} for ${job.name} was declined`,
      text: [
        `${job.company.name} cannot take on change order ${order.number}. The reason: ${reason}`,
        'What is signed and what is to be paid stay as they were.',
        `Questions? Call ${job.company.name} at ${job.company.phone}.`,
      ].join('\n\n'),
      action: {
        label: 'Open the change order',
        url: environment().APP_ORIGIN + paths.changeOrder(job.company.slug, jobId, order.id),
      },
    });
}
