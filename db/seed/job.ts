import type { Member } from '@/lib/contracts/actor';
import type { JobView } from '@/lib/contracts/job';
import { listInvitations } from '@/lib/services/invitation/list';
import { sendInvitation } from '@/lib/services/invitation/send';
import { createJob } from '@/lib/services/job/create';
import { listJobs } from '@/lib/services/job/list';
import { readJob } from '@/lib/services/job/read';
import { done } from './contractor';

/** Opens a job unless the company has one by that name. */
export async function ensureJob(
  salesperson: Member,
  wanted: { readonly name: string; readonly address: string },
): Promise<JobView> {
  const known = done(await listJobs(salesperson)).find((job) => job.name === wanted.name);
  return done(known ? await readJob(salesperson, { jobId: known.id }) : await createJob(salesperson, wanted));
}

/** Invites somebody to a job unless that was done before. */
export async function ensureInvited(
  salesperson: Member,
  jobId: string,
  { name, email }: { readonly name: string; readonly email: string },
): Promise<void> {
  const sent = done(await listInvitations(salesperson, { jobId }));
  if (sent.some((invitation) => invitation.email === email)) return;
  done(await sendInvitation(salesperson, { jobId, name, email, signer: true }));
}
