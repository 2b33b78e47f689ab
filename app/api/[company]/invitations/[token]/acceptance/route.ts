import { answerVisitor } from '@/app/api/answer';
import { acceptInvitation } from '@/lib/services/invitation/accept';

interface Context {
  readonly params: Promise<{ company: string; token: string }>;
}

/** Lets whoever is signed in into the job that the invitation is for, when its address is theirs. */
export function POST(request: Request, { params }: Context): Promise<Response> {
  return answerVisitor(request, async (visitor) => {
    const { company, token } = await params;
    return acceptInvitation(visitor, { slug: company, token });
  });
}
