import { and, desc, eq, isNull } from 'drizzle-orm';
import { withScope, type Transaction } from '@/db/client';
import { guests, jobs, people } from '@/db/schema';
import type { Member } from '@/lib/contracts/actor';
import type { OwnJob } from '@/lib/contracts/job';
import { findCompanyBySlug } from '../company/find-by-slug';
import { resolveActor } from './resolve-actor';

/** What a signed-in visitor finds at a contractor's: the desk for staff, their own jobs for a homeowner. */
export interface OwnJobs {
  readonly member: Member | null;
  /** Newest first; all of the company's for staff. Empty for a stranger. */
  readonly jobs: readonly OwnJob[];
}

const columns = {
  id: jobs.id,
  number: jobs.number,
  name: jobs.name,
  address: jobs.address,
  stage: jobs.stage,
};

/** The jobs that a signed-in visitor may open under a contractor's slug; null when there is no such contractor. */
export async function listOwnJobs({
  slug,
  clerkUserId,
}: {
  readonly slug: string;
  readonly clerkUserId: string;
}): Promise<OwnJobs | null> {
  const company = await findCompanyBySlug(slug);
  if (!company) return null;
  const companyId = company.id;
  const member = await resolveActor({ slug, clerkUserId });
  if (member?.kind === 'member') {
    const own = await withScope(member, (tx) =>
      tx.select(columns).from(jobs).where(eq(jobs.companyId, companyId)).orderBy(desc(jobs.number)),
    );
    return { member, jobs: own };
  }
  const jobIds = await guestJobs(companyId, clerkUserId);
  const own: OwnJob[] = [];
  // A guest's scope shows one job, so each is read in its own.
  for (const jobId of jobIds) {
    const actor = await resolveActor({ slug, clerkUserId, jobId });
    if (actor) own.push(...(await withScope(actor, (tx) => readOwn(tx, companyId, jobId))));
  }
  return { member: null, jobs: own.sort((a, b) => b.number - a.number) };
}

const readOwn = (tx: Transaction, companyId: string, jobId: string): Promise<OwnJob[]> =>
  tx
    .select(columns)
    .from(jobs)
    .where(and(eq(jobs.companyId, companyId), eq(jobs.id, jobId)));

async function guestJobs(companyId: string, clerkUserId: string): Promise<string[]> {
  const person = await withScope({ kind: 'user', key: clerkUserId, companyId }, async (tx) => {
    const [row] = await tx
      .select({ id: people.id })
      .from(people)
      .where(and(eq(people.companyId, companyId), eq(people.clerkUserId, clerkUserId)));
    return row;
  });
  if (!person) return [];
  const rows = await withScope({ kind: 'person', key: person.id, companyId }, (tx) =>
    tx
      .select({ jobId: guests.jobId })
      .from(guests)
      .where(and(eq(guests.companyId, companyId), eq(guests.personId, person.id), isNull(guests.revokedAt))),
  );
  return rows.map((row) => row.jobId);
}
