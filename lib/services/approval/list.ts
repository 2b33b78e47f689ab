import { and, asc, eq } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { changeOrders, editionCosts, jobs, offers, people } from '@/db/schema';
import { now } from '@/lib/adapters/clock';
import type { Actor } from '@/lib/contracts/actor';
import type { ApprovalRow } from '@/lib/contracts/change-order';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { marginOf, takeoff } from '@/lib/engine';
import { sealedBodies } from '../change-order/find';
import { loadKitchen } from '../job/load-kitchen';
import { bodyOf } from '../offer/view';

const HOUR_MS = 3_600_000;

/** Signed change orders that wait for a decision, the oldest first; margins for who may see costs. */
export async function listApprovals(actor: Actor): Promise<Result<ApprovalRow[]>> {
  if (!may(actor.role, 'approval.list')) {
    return refuse('notAllowed', reasonNot(actor.role, 'approval.list') ?? 'This is not for you.');
  }
  const { companyId } = actor;
  return withScope(actor, async (tx) => {
    const rows = await tx
      .select({ order: changeOrders, job: jobs, offer: offers, asked: people.name })
      .from(changeOrders)
      .innerJoin(jobs, and(eq(jobs.companyId, changeOrders.companyId), eq(jobs.id, changeOrders.jobId)))
      .innerJoin(
        offers,
        and(eq(offers.companyId, changeOrders.companyId), eq(offers.id, changeOrders.offerId)),
      )
      .innerJoin(
        people,
        and(eq(people.companyId, changeOrders.companyId), eq(people.id, changeOrders.personId)),
      )
      .where(and(eq(changeOrders.companyId, companyId), eq(changeOrders.state, 'signed')))
      .orderBy(asc(changeOrders.updatedAt));
    const at = now().getTime();
    const answer: ApprovalRow[] = [];
    for (const { order, job, offer, asked } of rows) {
      const body = bodyOf(offer);
      answer.push({
        id: order.id,
        jobId: job.id,
        jobName: job.name,
        number: order.number,
        stage: job.stage,
        amountCents: body.sum.thisPageCents,
        sumBeforeCents: body.sum.beforeCents,
        reason: order.reason,
        scope: body.scope,
        askedBy: asked,
        ageHours: Math.max(0, Math.floor((at - order.updatedAt.getTime()) / HOUR_MS)),
        margin: may(actor.role, 'cost.read') ? await margins(job.id, order.choices) : null,
      });
    }
    return ok(answer);

    async function margins(
      jobId: string,
      wanted: (typeof rows)[number]['order']['choices'],
    ): Promise<ApprovalRow['margin']> {
      const kitchen = await loadKitchen(tx, companyId, jobId);
      const sealed = await sealedBodies(tx, companyId, jobId);
      const last = sealed[sealed.length - 1];
      if (!kitchen || 'missing' in kitchen || !last) return null;
      const [costs] = await tx
        .select({ body: editionCosts.body })
        .from(editionCosts)
        .where(and(eq(editionCosts.companyId, companyId), eq(editionCosts.editionId, kitchen.editionId)));
      if (!costs) return null;
      const { survey, edition, terms } = kitchen;
      const of = (choices: typeof wanted) =>
        marginOf(takeoff(survey, edition, choices, terms), costs.body).margin;
      return { beforeCents: of(last.body.choices), afterCents: of(wanted) };
    }
  });
}
