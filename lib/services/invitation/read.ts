import { and, eq } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { invitations, jobs, people } from '@/db/schema';
import { now } from '@/lib/adapters/clock';
import { sha256 } from '@/lib/adapters/ids';
import { tokenShape, type OpenInvitation } from '@/lib/contracts/invitation';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { findCompanyBySlug } from '../company/find-by-slug';
import { invitationState } from './state';

const NONE = 'This invitation cannot be found. Please open the newest mail from your contractor.';

/** What the holder of a link may know before signing in. A wrong token, or another contractor's, finds nothing. */
export async function readInvitation({
  slug,
  token,
}: {
  readonly slug: string;
  readonly token: string;
}): Promise<Result<OpenInvitation>> {
  const company = await findCompanyBySlug(slug);
  if (!company || !tokenShape.safeParse(token).success) return refuse('notFound', NONE);
  const companyId = company.id;
  const invitation = await withScope({ kind: 'invitation', key: sha256(token), companyId }, async (tx) => {
    const [row] = await tx.select().from(invitations);
    return row;
  });
  if (!invitation) return refuse('notFound', NONE);
  return withScope({ kind: 'worker', companyId }, async (tx) => {
    const [job] = await tx
      .select({ name: jobs.name })
      .from(jobs)
      .where(and(eq(jobs.companyId, companyId), eq(jobs.id, invitation.jobId)));
    const [inviter] = await tx
      .select({ name: people.name })
      .from(people)
      .where(and(eq(people.companyId, companyId), eq(people.id, invitation.invitedBy)));
    if (!job || !inviter) throw new Error(`Invitation ${invitation.id} has no job.`);
    return ok({
      company,
      state: invitationState(invitation, now()),
      jobId: invitation.jobId,
      jobName: job.name,
      email: invitation.email,
      name: invitation.name,
      invitedBy: inviter.name,
      expiresAt: invitation.expiresAt.toISOString(),
    });
  });
}
