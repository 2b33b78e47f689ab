import { answer } from '@/app/api/answer';
import { readOffer } from '@/lib/services/offer/read';

interface Context {
  readonly params: Promise<{ company: string; job: string; offer: string }>;
}

/** One offer with its signatures. */
export function GET(request: Request, { params }: Context): Promise<Response> {
  return answer(request, params, async (actor) => {
    const { job, offer } = await params;
    return readOffer(actor, { jobId: job, offerId: offer });
  });
}
