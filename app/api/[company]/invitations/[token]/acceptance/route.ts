import { currentUser } from '@clerk/nextjs/server';
import { answerVisitor } from '@/app/api/answer';
import { refuse } from '@/lib/contracts/result';
import { acceptInvitation } from '@/lib/services/invitation/accept';

interface Context {
  readonly params: Promise<{ company: string; token: string }>;
}

/** Lets whoever is signed in into the job that the invitation is for, when its address is theirs. */
export function POST(request: Request, { params }: Context): Promise<Response> {
  return answerVisitor(request, async (clerkUserId) => {
    const { company, token } = await params;
    const user = await currentUser();
    if (user?.id !== clerkUserId) return refuse('signedOut', 'You are signed out. Please sign in again.');
    const verified = user.emailAddresses.filter((address) => address.verification?.status === 'verified');
    const visitor = {
      clerkUserId,
      name: [user.firstName, user.lastName].filter(Boolean).join(' '),
      verifiedEmails: verified.map((address) => address.emailAddress),
    };
    return acceptInvitation(visitor, { slug: company, token });
  });
}
