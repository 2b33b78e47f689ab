import { withScope } from '@/db/client';
import type { Actor } from '@/lib/contracts/actor';
import { jobReferenceShape, type JobView } from '@/lib/contracts/job';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { findJob } from './view';

/** One job, for its staff and its household. */
export async function readJob(actor: Actor, input: unknown): Promise<Result<JobView>> {
  const parsed = jobReferenceShape.safeParse(input);
  if (!parsed.success) return refuse('notFound', 'There is no such job here.');
  if (!may(actor.role, 'job.read')) {
    return refuse('notAllowed', reasonNot(actor.role, 'job.read') ?? 'This is not for you.');
  }
  const job = await withScope(actor, (tx) => findJob(tx, actor.companyId, parsed.data.jobId));
  return job ? ok(job) : refuse('notFound', 'There is no such job here.');
}
