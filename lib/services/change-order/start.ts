import { and, count, desc, eq, isNull } from 'drizzle-orm';
import { lockJob, withScope } from '@/db/client';
import { changeOrders, schemes } from '@/db/schema';
import { now } from '@/lib/adapters/clock';
import type { Actor, Worker } from '@/lib/contracts/actor';
import { changeOrderInputShape } from '@/lib/contracts/change-order';
import { faultsOf } from '@/lib/contracts/faults';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { formatCents } from '@/lib/engine/money';
import { writeAudit } from '../audit/write';
import { loadKitchen, missingSentence } from '../job/load-kitchen';
import { findJob } from '../job/view';
import { sealedBodies } from './find';
import { renewChangeOrder } from './renew';

const NO_JOB = 'There is no such job here.';
const OPEN_MAX = 6;

/**
 * Asks for a scheme's choices instead of the sealed ones. The order is offered to the household at once; a
 * contractor's own beyond a salesperson's limit is for the owner to start.
 */
export async function startChangeOrder(actor: Actor, input: unknown): Promise<Result<{ id: string }>> {
  const parsed = changeOrderInputShape.safeParse(input);
  if (!parsed.success) {
    const faults = faultsOf(parsed.error);
    return faults.some((fault) => fault.path === 'jobId')
      ? refuse('notFound', NO_JOB)
      : refuse('invalid', faults[0]?.message ?? 'This could not be read.', { faults });
  }
  if (!may(actor.role, 'changeOrder.start')) {
    return refuse('notAllowed', reasonNot(actor.role, 'changeOrder.start') ?? 'This is not for you.');
  }
  const { jobId, schemeId, reason } = parsed.data;
  const { companyId } = actor;
  const visible = await withScope(actor, (tx) => findJob(tx, companyId, jobId));
  if (!visible) return refuse('notFound', NO_JOB);
  const worker: Worker = { kind: 'worker', companyId };
  let refusal: Result<never> | null = null;
  const started = await withScope(worker, async (tx): Promise<Result<{ id: string }>> => {
    await lockJob(tx, companyId, jobId);
    const kitchen = await loadKitchen(tx, companyId, jobId);
    if (!kitchen) return refuse('notFound', NO_JOB);
    if ('missing' in kitchen) return refuse('conflict', missingSentence(kitchen.missing));
    const sealed = await sealedBodies(tx, companyId, jobId);
    const last = sealed[sealed.length - 1];
    if (!last) return refuse('conflict', 'Nothing is signed yet; before that, choices are simply changed.');
    const [scheme] = await tx
      .select()
      .from(schemes)
      .where(
        and(
          eq(schemes.companyId, companyId),
          eq(schemes.jobId, jobId),
          eq(schemes.id, schemeId),
          isNull(schemes.archivedAt),
        ),
      );
    if (!scheme) return refuse('notFound', 'There is no such scheme here.');
    if (sameChoices(scheme.choices, last.body.choices))
      return refuse('conflict', 'These are the choices that are signed already.');
    const here = and(eq(changeOrders.companyId, companyId), eq(changeOrders.jobId, jobId));
    const open = await tx
      .select({ state: changeOrders.state, of: count() })
      .from(changeOrders)
      .where(here)
      .groupBy(changeOrders.state);
    const waiting = open.filter((one) => ['draft', 'offered', 'signed'].includes(one.state));
    if (waiting.reduce((sum, one) => sum + one.of, 0) >= OPEN_MAX)
      return refuse(
        'tooMany',
        `${OPEN_MAX} change orders are open on this job. Sign or withdraw one of them first.`,
      );
    const [newest] = await tx
      .select({ number: changeOrders.number })
      .from(changeOrders)
      .where(here)
      .orderBy(desc(changeOrders.number))
      .limit(1);
    const [row] = await tx
      .insert(changeOrders)
      .values({
        companyId,
        jobId,
        number: (newest?.number ?? 0) + 1,
        state: 'draft',
        startedBy: actor.kind === 'guest' ? 'homeowner' : 'contractor',
        personId: actor.personId,
        reason,
        choices: scheme.choices,
        editionId: kitchen.editionId,
        surveyId: kitchen.surveyId,
        baseSequence: last.sequence,
        createdAt: now(),
      })
      .returning();
    if (!row) throw new Error('The change order was not stored.');
    const offer = await renewChangeOrder(tx, actor, row.id);
    const limit = kitchen.company.settings.salespersonLimitCents;
    if (!offer.ok) refusal = offer;
    else if (actor.role === 'salesperson' && Math.abs(offer.value.body.sum.thisPageCents) > limit)
      refusal = refuse(
        'notAllowed',
        `A change of ${formatCents(offer.value.body.sum.thisPageCents)} is beyond a salesperson’s limit of ${formatCents(limit)}. The owner starts it.`,
      );
    // Thrown, so that nothing of a refused order stays.
    if (refusal) throw new Refused();
    await writeAudit(tx, actor, {
      verb: 'changeOrder.start',
      subject: row.id,
      jobId,
      detail: { number: row.number, reason },
    });
    return ok({ id: row.id });
  }).catch((error: unknown) => {
    if (error instanceof Refused && refusal) return refusal;
    throw error;
  });
  return started;
}

class Refused extends Error {}

const sameChoices = (a: object, b: object): boolean => sorted(a) === sorted(b);

/** JSON with its keys in order; a value read back from the database has them in another. */
const sorted = (value: unknown): string =>
  JSON.stringify(value, (_key, part: unknown) =>
    typeof part === 'object' && part !== null && !Array.isArray(part)
      ? Object.fromEntries(Object.entries(part).sort(([a], [b]) => (a < b ? -1 : 1)))
      : part,
  );
