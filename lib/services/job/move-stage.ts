import { and, asc, eq, sql } from 'drizzle-orm';
import { withScope, type Transaction } from '@/db/client';
import { draws, jobs } from '@/db/schema';
import type { Actor } from '@/lib/contracts/actor';
import { stageMoveShape, type JobView } from '@/lib/contracts/job';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { canMove, JOB_STAGE_NAMES, JOB_STAGE_NEXT, type JobStage } from '@/lib/contracts/states';
import { writeAudit } from '../audit/write';
import { findJob } from './view';

/**
 * Moves a job to one of its next stages; payments that fall due there become due. Asking for the stage it has
 * changes nothing. To Signed a job comes by its last signature alone, to Released only when its first payment has
 * been received.
 */
export async function moveJobStage(actor: Actor, input: unknown): Promise<Result<JobView>> {
  const parsed = stageMoveShape.safeParse(input);
  if (!parsed.success) return refuse('invalid', 'A job can only be moved to a stage that there is.');
  if (!may(actor.role, 'job.moveStage')) {
    return refuse('notAllowed', reasonNot(actor.role, 'job.moveStage') ?? 'This is not for you.');
  }
  const { jobId, to } = parsed.data;
  const { companyId } = actor;
  return withScope(actor, async (tx) => {
    const own = and(eq(jobs.companyId, companyId), eq(jobs.id, jobId));
    const [locked] = await tx.select({ stage: jobs.stage }).from(jobs).where(own).for('update');
    const job = locked && (await findJob(tx, companyId, jobId));
    if (!job) return refuse('notFound', 'There is no such job here.');
    if (job.stage === to) return ok(job);
    const hindrance = await hindranceTo(tx, companyId, jobId, job.stage, to);
    if (hindrance) return refuse('conflict', hindrance);
    await tx.update(jobs).set({ stage: to }).where(own);
    await makeDrawsDue(tx, companyId, jobId, to);
    await writeAudit(tx, actor, {
      verb: 'job.moveStage',
      subject: jobId,
      jobId,
      detail: { from: job.stage, to },
    });
    return ok({ ...job, stage: to });
  });
}

async function hindranceTo(
  tx: Transaction,
  companyId: string,
  jobId: string,
  from: JobStage,
  to: JobStage,
): Promise<string | null> {
  if (!canMove(JOB_STAGE_NEXT, from, to)) {
    return `From ${JOB_STAGE_NAMES[from]} a job cannot go to ${JOB_STAGE_NAMES[to]}.`;
  }
  if (to === 'signed') return 'A job is signed by its last signature, not here.';
  if (to === 'released') {
    const [first] = await tx
      .select({ state: draws.state })
      .from(draws)
      .where(and(eq(draws.companyId, companyId), eq(draws.jobId, jobId)))
      .orderBy(asc(draws.number))
      .limit(1);
    if (first?.state !== 'paid') return 'The first payment has not been received yet.';
  }
  return null;
}

/** Payments that fall due at a stage become due when the job comes to it. */
async function makeDrawsDue(
  tx: Transaction,
  companyId: string,
  jobId: string,
  stage: JobStage,
): Promise<void> {
  const here = sql`${draws.due} = ${stage}`;
  await tx
    .update(draws)
    .set({ state: 'due', updatedAt: sql`now()` })
    .where(and(eq(draws.companyId, companyId), eq(draws.jobId, jobId), eq(draws.state, 'planned'), here));
}
