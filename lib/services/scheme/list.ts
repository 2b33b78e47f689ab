import { and, eq } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { jobs } from '@/db/schema';
import type { Actor } from '@/lib/contracts/actor';
import { jobReferenceShape } from '@/lib/contracts/job';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import type { SchemeView } from '@/lib/contracts/scheme';
import { readSchemes } from './view';

/** A job's schemes, by letter. */
export async function listSchemes(actor: Actor, input: unknown): Promise<Result<SchemeView[]>> {
  const parsed = jobReferenceShape.safeParse(input);
  if (!parsed.success) return refuse('notFound', 'There is no such job here.');
  if (!may(actor.role, 'scheme.read')) {
    return refuse('notAllowed', reasonNot(actor.role, 'scheme.read') ?? 'This is not for you.');
  }
  const { jobId } = parsed.data;
  return withScope(actor, async (tx) => {
    const [job] = await tx
      .select({ id: jobs.id })
      .from(jobs)
      .where(and(eq(jobs.companyId, actor.companyId), eq(jobs.id, jobId)));
    if (!job) return refuse('notFound', 'There is no such job here.');
    return ok(await readSchemes(tx, actor.companyId, jobId));
  });
}
