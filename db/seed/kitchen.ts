import type { Member } from '@/lib/contracts/actor';
import type { OpenInvitation } from '@/lib/contracts/invitation';
import type { JobView } from '@/lib/contracts/job';
import type { Choices, Survey } from '@/lib/engine/types';
import type { Edition, EditionCosts } from '@/lib/engine/edition-types';
import { publishEdition } from '@/lib/services/edition/publish';
import { listInvitations } from '@/lib/services/invitation/list';
import { sendInvitation } from '@/lib/services/invitation/send';
import { createJob } from '@/lib/services/job/create';
import { listJobs } from '@/lib/services/job/list';
import { readJob } from '@/lib/services/job/read';
import { createScheme } from '@/lib/services/scheme/create';
import { listSchemes } from '@/lib/services/scheme/list';
import { importSurvey } from '@/lib/services/survey/import';
import { done } from './contractor';

interface Kitchen {
  readonly name: string;
  readonly address: string;
  readonly survey: Survey;
  /** The contractor's proposal, where the job is that far. */
  readonly proposal?: {
    readonly name: string;
    readonly choices: Choices;
    readonly decided: readonly string[];
  };
}

/** Opens a job with its survey and its proposal, as far as that has not been done. */
export async function ensureKitchen(salesperson: Member, kitchen: Kitchen): Promise<JobView> {
  const { name, address, survey, proposal } = kitchen;
  const known = done(await listJobs(salesperson)).find((job) => job.name === name);
  const opened = known
    ? done(await readJob(salesperson, { jobId: known.id }))
    : done(await createJob(salesperson, { name, address }));
  const jobId = opened.id;
  if (opened.surveyId === null) done(await importSurvey(salesperson, { jobId, survey }));
  if (proposal && done(await listSchemes(salesperson, { jobId })).length === 0) {
    done(await createScheme(salesperson, { jobId, ...proposal }));
  }
  return done(await readJob(salesperson, { jobId }));
}

/** Invites somebody to a job unless that was done before. */
export async function ensureInvited(
  salesperson: Member,
  jobId: string,
  { name, email }: Pick<OpenInvitation, 'name' | 'email'>,
): Promise<void> {
  const sent = done(await listInvitations(salesperson, { jobId }));
  if (sent.some((invitation) => invitation.email === email)) return;
  done(await sendInvitation(salesperson, { jobId, name, email, signer: true }));
}

/** Publishes a company's first edition unless it has one. */
export async function ensureEdition(
  owner: Member,
  book: { readonly edition: Edition; readonly costs: EditionCosts },
): Promise<void> {
  const published = await publishEdition(owner, book);
  if (published.ok) return;
  const number = published.fault.faults?.some((fault) => fault.path === 'edition.number');
  if (!number) done(published);
}
