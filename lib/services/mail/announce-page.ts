import { and, eq, isNull } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { companies, guests, jobs, pages, people } from '@/db/schema';
import { environment } from '@/lib/adapters/environment';
import { enqueue } from '@/lib/adapters/queue';
import type { PageSealedJob } from '@/lib/contracts/jobs';
import { paths } from '@/lib/paths';

const KIND_WORDS: Readonly<Record<(typeof pages.$inferSelect)['kind'], string>> = {
  agreement: 'The agreement',
  changeOrder: 'A change order',
  cancellation: 'The cancellation',
  measureRevision: 'The final measure',
};

/** Tells the household and the salesperson that a page was sealed, each by a mail of their own. */
export async function announcePage({ companyId, jobId, sequence }: PageSealedJob): Promise<void> {
  await withScope({ kind: 'worker', companyId }, async (tx) => {
    const [found] = await tx
      .select({ page: pages, job: jobs, company: companies, salesperson: people })
      .from(pages)
      .innerJoin(jobs, and(eq(jobs.companyId, pages.companyId), eq(jobs.id, pages.jobId)))
      .innerJoin(companies, eq(companies.id, pages.companyId))
      .innerJoin(people, and(eq(people.companyId, jobs.companyId), eq(people.id, jobs.salespersonId)))
      .where(and(eq(pages.companyId, companyId), eq(pages.jobId, jobId), eq(pages.sequence, sequence)));
    if (!found) throw new Error(`Job ${jobId} has no page ${sequence}.`);
    const { page, job, company, salesperson } = found;
    const household = await tx
      .select({ name: people.name, email: people.email })
      .from(guests)
      .innerJoin(people, and(eq(people.companyId, guests.companyId), eq(people.id, guests.personId)))
      .where(and(eq(guests.companyId, companyId), eq(guests.jobId, jobId), isNull(guests.revokedAt)));
    const words = {
      subject: `Page ${sequence} of the job book for ${job.name}`,
      text: [
        `${KIND_WORDS[page.kind]} for ${job.name} is signed by everyone and sealed as page ${sequence} of the job book. Nobody can alter it from now on, and you can print or keep it.`,
        `Its seal:\n${page.sha256}`,
        `Questions? Call ${company.name} at ${company.phone}.`,
      ].join('\n\n'),
    };
    const url = environment().APP_ORIGIN + paths.bookPage(company.slug, jobId, sequence);
    for (const to of [...household, { name: salesperson.name, email: salesperson.email }]) {
      await enqueue(tx, 'mail', { companyId, to, ...words, action: { label: `Open page ${sequence}`, url } });
    }
  });
}
