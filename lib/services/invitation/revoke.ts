import { and, eq } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { invitations } from '@/db/schema';
import { now } from '@/lib/adapters/clock';
import type { Actor } from '@/lib/contracts/actor';
import { invitationRevocationShape, type InvitationView } from '@/lib/contracts/invitation';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { writeAudit } from '../audit/write';
import { invitationView } from './state';

/** Ends an invitation that nobody has accepted yet. Ending it again changes nothing. */
export async function revokeInvitation(actor: Actor, input: unknown): Promise<Result<InvitationView>> {
  const parsed = invitationRevocationShape.safeParse(input);
  if (!parsed.success) return refuse('notFound', 'There is no such invitation here.');
  if (!may(actor.role, 'invitation.revoke')) {
    return refuse('notAllowed', reasonNot(actor.role, 'invitation.revoke') ?? 'This is not for you.');
  }
  const own = and(eq(invitations.companyId, actor.companyId), eq(invitations.id, parsed.data.invitationId));
  const at = now();
  return withScope(actor, async (tx) => {
    const [row] = await tx.select().from(invitations).where(own).for('update');
    if (!row) return refuse('notFound', 'There is no such invitation here.');
    if (row.acceptedAt) return refuse('conflict', `${row.name} has accepted this invitation already.`);
    if (row.revokedAt) return ok(invitationView(row, at));
    await tx.update(invitations).set({ revokedAt: at }).where(own);
    await writeAudit(tx, actor, {
      verb: 'invitation.revoke',
      subject: row.id,
      jobId: row.jobId,
      detail: { email: row.email },
    });
    return ok(invitationView({ ...row, revokedAt: at }, at));
  });
}
