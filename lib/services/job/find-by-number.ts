import { and, eq } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { jobs } from '@/db/schema';
import type { Actor } from '@/lib/contracts/actor';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';

/** The id of the job that has this number in the company. */
export async function findJobByNumber(actor: Actor, number: number): Promise<Result<string>> {
  if (!may(actor.role, 'job.read')) {
    return refuse('notAllowed', reasonNot(actor.role, 'job.read') ?? 'This is not for you.');
  }
  const [row] = await withScope(actor, (tx) =>
    tx
      .select({ id: jobs.id })
      .from(jobs)
      .where(and(eq(jobs.companyId, actor.companyId), eq(jobs.number, number))),
  );
  return row ? ok(row.id) : refuse('notFound', `There is no job ${number} here.`);
}
