import { answer } from '@/app/api/answer';
import { signOffer } from '@/lib/services/signature/sign';

interface Context {
  readonly params: Promise<{ company: string; job: string; offer: string }>;
}

/** Signs an offer: `{ sha256, consent, means }`. */
export function POST(request: Request, { params }: Context): Promise<Response> {
  return answer(request, params, async (actor, body) => {
    const { job, offer } = await params;
    return signOffer(actor, { ...Object(body), jobId: job, offerId: offer });
  });
}
