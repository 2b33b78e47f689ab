import { and, asc, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { companies, jobs, offers, pages } from '@/db/schema';

/** A job's sealed pages with what was signed, in order; `null` when the scope shows no such job. */
export async function findPages(tx: Transaction, companyId: string, jobId: string) {
  const [job] = await tx
    .select({ name: jobs.name, company: companies.name, timeZone: companies.timeZone })
    .from(jobs)
    .innerJoin(companies, eq(companies.id, jobs.companyId))
    .where(and(eq(jobs.companyId, companyId), eq(jobs.id, jobId)));
  if (!job) return null;
  const rows = await tx
    .select({ page: pages, offer: offers })
    .from(pages)
    .innerJoin(offers, and(eq(offers.companyId, pages.companyId), eq(offers.id, pages.offerId)))
    .where(and(eq(pages.companyId, companyId), eq(pages.jobId, jobId)))
    .orderBy(asc(pages.sequence));
  return { ...job, rows };
}
