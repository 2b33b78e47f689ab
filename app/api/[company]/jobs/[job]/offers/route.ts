import { answer } from '@/app/api/answer';
import { prepareOffer } from '@/lib/services/offer/prepare';

interface Context {
  readonly params: Promise<{ company: string; job: string }>;
}

/** Prepares the agreement for a scheme: `{ schemeId }`. */
export function POST(request: Request, { params }: Context): Promise<Response> {
  return answer(request, params, async (actor, body) =>
    prepareOffer(actor, { ...Object(body), jobId: (await params).job }),
  );
}
