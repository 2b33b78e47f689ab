import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { jobs } from '@/db/schema';
import { sorrelLane, sorrelLaneProposed } from '@/db/seed/scenario/sorrel-lane';
import type { Member } from '@/lib/contracts/actor';
import type { Result } from '@/lib/contracts/result';
import { paths } from '@/lib/paths';
import { findCompanyBySlug } from '@/lib/services/company/find-by-slug';
import { issueInvitation } from '@/lib/services/invitation/send';
import { createJob } from '@/lib/services/job/create';
import { findMember } from '@/lib/services/person/find-member';
import { createScheme } from '@/lib/services/scheme/create';
import { importSurvey } from '@/lib/services/survey/import';
import { stack } from './base';

export interface Person {
  readonly name: string;
  readonly email: string;
  /** The link of the invitation. */
  readonly link: string;
}

export interface NewHousehold {
  readonly jobId: string;
  readonly jobName: string;
  readonly schemeId: string;
  readonly people: readonly Person[];
}

function done<T>(result: Result<T>): T {
  if (!result.ok) throw new Error(result.fault.sentence);
  return result.value;
}

/** The salesperson of the demo's first contractor, as services know them. */
export async function salesperson(): Promise<Member> {
  const company = await findCompanyBySlug('tern-hollow');
  const member = company && (await findMember(company.id, 'rowan@ternhollow.example'));
  if (!member) throw new Error('The demo has no Rowan.');
  return member;
}

/** A job of Tern Hollow with a surveyed kitchen, a proposal, and people who are invited to sign. */
export async function newHousehold(signers: 1 | 2): Promise<NewHousehold> {
  const rowan = await salesperson();
  const tag = randomUUID().slice(0, 8);
  const job = done(await createJob(rowan, { name: `Kitchen ${tag}`, address: `${tag} Test Lane` }));
  await withScope(rowan, async (tx) => {
    const [edition] = await tx.query.editions.findMany({ limit: 1 });
    if (!job.editionId) await tx.update(jobs).set({ editionId: edition?.id }).where(eq(jobs.id, job.id));
  });
  done(await importSurvey(rowan, { jobId: job.id, survey: sorrelLane }));
  const scheme = done(
    await createScheme(rowan, {
      jobId: job.id,
      name: 'Proposed to begin with',
      choices: sorrelLaneProposed,
      decided: [],
    }),
  );
  const people: Person[] = [];
  for (let n = 1; n <= signers; n++) {
    const email = `guest-${n}-${tag}@household.example`;
    const name = `Guest ${n} of ${tag}`;
    const { token } = done(await issueInvitation(rowan, { jobId: job.id, email, name, signer: true }));
    people.push({ name, email, link: stack.web + paths.invitation('tern-hollow', token) });
  }
  return { jobId: job.id, jobName: job.name, schemeId: scheme.id, people };
}
