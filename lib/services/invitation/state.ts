import type { invitations } from '@/db/schema';
import type { InvitationState, InvitationView } from '@/lib/contracts/invitation';

type Invitation = typeof invitations.$inferSelect;

/** How an invitation stands at an instant. */
export function invitationState(
  row: Pick<Invitation, 'acceptedAt' | 'revokedAt' | 'expiresAt'>,
  at: Date,
): InvitationState {
  if (row.acceptedAt) return 'accepted';
  if (row.revokedAt) return 'revoked';
  return row.expiresAt <= at ? 'expired' : 'open';
}

export function invitationView(row: Invitation, at: Date): InvitationView {
  return {
    id: row.id,
    jobId: row.jobId,
    email: row.email,
    name: row.name,
    signer: row.signer,
    state: invitationState(row, at),
    sentAt: row.createdAt.toISOString(),
    expiresAt: row.expiresAt.toISOString(),
  };
}
