import { and, desc, eq } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { companies, editions, jobs, members } from '@/db/schema';
import type { Actor } from '@/lib/contracts/actor';
import { faultsOf } from '@/lib/contracts/faults';
import { jobInputShape, type JobView } from '@/lib/contracts/job';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { writeAudit } from '../audit/write';
import { findJob } from './view';

/** Opens a job at the stage Measured, with the company's next number and its newest edition. */
export async function createJob(actor: Actor, input: unknown): Promise<Result<JobView>> {
  const parsed = jobInputShape.safeParse(input);
  if (!parsed.success) {
    return refuse('invalid', 'A job needs a name and an address.', { faults: faultsOf(parsed.error) });
  }
  if (!may(actor.role, 'job.create')) {
    return refuse('notAllowed', reasonNot(actor.role, 'job.create') ?? 'This is not for you.');
  }
  const { companyId } = actor;
  const { name, address, salespersonId = actor.personId } = parsed.data;
  return withScope(actor, async (tx) => {
    // Held so that two jobs opened at the same moment get two numbers.
    await tx.select({ id: companies.id }).from(companies).where(eq(companies.id, companyId)).for('update');
    const [salesperson] = await tx
      .select({ id: members.personId })
      .from(members)
      .where(
        and(eq(members.companyId, companyId), eq(members.personId, salespersonId), eq(members.active, true)),
      );
    if (!salesperson) return refuse('notFound', 'There is no such salesperson here.');
    const [last] = await tx
      .select({ number: jobs.number })
      .from(jobs)
      .where(eq(jobs.companyId, companyId))
      .orderBy(desc(jobs.number))
      .limit(1);
    const [edition] = await tx
      .select({ id: editions.id })
      .from(editions)
      .where(eq(editions.companyId, companyId))
      .orderBy(desc(editions.number))
      .limit(1);
    const [row] = await tx
      .insert(jobs)
      .values({
        companyId,
        number: (last?.number ?? 0) + 1,
        name,
        address,
        salespersonId,
        editionId: edition?.id ?? null,
      })
      .returning({ id: jobs.id });
    const job = row && (await findJob(tx, companyId, row.id));
    if (!job) throw new Error('The job was not stored.');
    await writeAudit(tx, actor, { verb: 'job.create', subject: job.id, jobId: job.id, detail: { name } });
    return ok(job);
  });
}
