import { answer } from '@/app/api/answer';
import { listInvitations } from '@/lib/services/invitation/list';
import { sendInvitation } from '@/lib/services/invitation/send';

interface Context {
  readonly params: Promise<{ company: string; job: string }>;
}

/** A job's invitations. */
export function GET(request: Request, { params }: Context): Promise<Response> {
  return answer(request, params, async (actor) => listInvitations(actor, { jobId: (await params).job }));
}

/** Invites somebody: `{ name, email, signer }`. */
export function POST(request: Request, { params }: Context): Promise<Response> {
  return answer(request, params, async (actor, body) =>
    sendInvitation(actor, { ...Object(body), jobId: (await params).job }),
  );
}
