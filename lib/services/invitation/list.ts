import { and, desc, eq } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { invitations, jobs } from '@/db/schema';
import { now } from '@/lib/adapters/clock';
import type { Actor } from '@/lib/contracts/actor';
import type { InvitationView } from '@/lib/contracts/invitation';
import { jobReferenceShape } from '@/lib/contracts/job';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { invitationView } from './state';

/** All invitations of a job, newest first, for its staff. */
export async function listInvitations(actor: Actor, input: unknown): Promise<Result<InvitationView[]>> {
  const parsed = jobReferenceShape.safeParse(input);
  if (!parsed.success) return refuse('notFound', 'There is no such job here.');
  if (!may(actor.role, 'invitation.send')) {
    return refuse('notAllowed', reasonNot(actor.role, 'invitation.send') ?? 'This is not for you.');
  }
  const { jobId } = parsed.data;
  return withScope(actor, async (tx) => {
    const [job] = await tx
      .select({ id: jobs.id })
      .from(jobs)
      .where(and(eq(jobs.companyId, actor.companyId), eq(jobs.id, jobId)));
    if (!job) return refuse('notFound', 'There is no such job here.');
    const rows = await tx
      .select()
      .from(invitations)
      .where(and(eq(invitations.companyId, actor.companyId), eq(invitations.jobId, jobId)))
      .orderBy(desc(invitations.createdAt));
    const at = now();
    return ok(rows.map((row) => invitationView(row, at)));
  });
}
