import type { Member } from '@/lib/contracts/actor';
import type { JobView } from '@/lib/contracts/job';
import type { Edition, EditionCosts } from '@/lib/engine/edition-types';
import type { Choices, Survey } from '@/lib/engine/types';
import { publishEdition } from '@/lib/services/edition/publish';
import { createScheme } from '@/lib/services/scheme/create';
import { listSchemes } from '@/lib/services/scheme/list';
import { importSurvey } from '@/lib/services/survey/import';
import { done } from './contractor';

/** Publishes a company's first edition unless it has one. */
export async function ensureEdition(
  owner: Member,
  book: { readonly edition: Edition; readonly costs: EditionCosts },
): Promise<void> {
  const published = await publishEdition(owner, book);
  if (published.ok) return;
  const isThere = published.fault.faults?.some((fault) => fault.path === 'edition.number');
  if (!isThere) done(published);
}

export interface Proposal {
  readonly name: string;
  readonly choices: Choices;
  readonly decided: readonly string[];
}

/** Brings a job its survey and, where the job is that far, its proposal, unless it has them. */
export async function ensureSurveyed(
  salesperson: Member,
  job: JobView,
  kitchen: { readonly survey: Survey; readonly proposal?: Proposal },
): Promise<void> {
  const jobId = job.id;
  if (job.surveyId === null) done(await importSurvey(salesperson, { jobId, survey: kitchen.survey }));
  if (!kitchen.proposal || done(await listSchemes(salesperson, { jobId })).length > 0) return;
  done(await createScheme(salesperson, { jobId, ...kitchen.proposal }));
}
