import { answer } from '@/app/api/answer';
import { readDoorOrder } from '@/lib/services/shop/door-order';

interface Context {
  readonly params: Promise<{ company: string; job: string }>;
}

/** The door order of the newest sealed page. */
export function GET(request: Request, { params }: Context): Promise<Response> {
  return answer(request, params, async (actor) => readDoorOrder(actor, { jobId: (await params).job }));
}
