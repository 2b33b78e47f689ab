import { answer } from '@/app/api/answer';
import { revokeInvitation } from '@/lib/services/invitation/revoke';

interface Context {
  readonly params: Promise<{ company: string; job: string; invitation: string }>;
}

/** Takes an invitation back. */
export function DELETE(request: Request, { params }: Context): Promise<Response> {
  return answer(request, params, async (actor) =>
    revokeInvitation(actor, { invitationId: (await params).invitation }),
  );
}
