import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { jobs, people } from '@/db/schema';
import type { JobView } from '@/lib/contracts/job';

/** A job with its salesperson; null when the scope shows no such job. */
export async function findJob(tx: Transaction, companyId: string, jobId: string): Promise<JobView | null> {
  const [row] = await tx
    .select({
      id: jobs.id,
      number: jobs.number,
      name: jobs.name,
      address: jobs.address,
      stage: jobs.stage,
      salesperson: { id: people.id, name: people.name, email: people.email },
      surveyId: jobs.surveyId,
      editionId: jobs.editionId,
      firstEstimateCents: jobs.firstEstimateCents,
    })
    .from(jobs)
    .innerJoin(people, and(eq(people.companyId, jobs.companyId), eq(people.id, jobs.salespersonId)))
    .where(and(eq(jobs.companyId, companyId), eq(jobs.id, jobId)));
  return row ?? null;
}
