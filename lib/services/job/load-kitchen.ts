import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { companies, editions, jobs, surveys } from '@/db/schema';
import { termsOf } from '@/lib/contracts/terms';
import type { Edition, Terms } from '@/lib/engine/edition-types';
import type { Survey } from '@/lib/engine/types';

/** All that a computation needs of a job, as it is stored. */
export interface Kitchen {
  readonly job: typeof jobs.$inferSelect;
  readonly company: typeof companies.$inferSelect;
  readonly surveyId: string;
  readonly survey: Survey;
  readonly surveySha256: string;
  readonly editionId: string;
  readonly edition: Edition;
  readonly editionSha256: string;
  readonly terms: Terms;
}

/**
 * A job with its present survey and edition. `missing` says which of them it does not have yet; null when the
 * scope shows no such job.
 */
export async function loadKitchen(
  tx: Transaction,
  companyId: string,
  jobId: string,
): Promise<Kitchen | { readonly missing: 'survey' | 'edition' } | null> {
  const [row] = await tx
    .select({ job: jobs, company: companies, survey: surveys, edition: editions })
    .from(jobs)
    .innerJoin(companies, eq(companies.id, jobs.companyId))
    .leftJoin(surveys, and(eq(surveys.companyId, jobs.companyId), eq(surveys.id, jobs.surveyId)))
    .leftJoin(editions, and(eq(editions.companyId, jobs.companyId), eq(editions.id, jobs.editionId)))
    .where(and(eq(jobs.companyId, companyId), eq(jobs.id, jobId)));
  if (!row) return null;
  const { job, company, survey, edition } = row;
  if (!survey) return { missing: 'survey' };
  if (!edition) return { missing: 'edition' };
  return {
    job,
    company,
    surveyId: survey.id,
    survey: survey.body,
    surveySha256: survey.sha256,
    editionId: edition.id,
    edition: edition.body,
    editionSha256: edition.sha256,
    terms: termsOf(company.settings),
  };
}

/** The sentence for a job that cannot be computed yet. */
export const missingSentence = (missing: 'survey' | 'edition'): string =>
  missing === 'survey' ? 'This job has no survey yet.' : 'This job has no edition of the price book yet.';
