import { answer } from '@/app/api/answer';
import { listDraws } from '@/lib/services/draw/list';

interface Context {
  readonly params: Promise<{ company: string; job: string }>;
}

/** A job's schedule of payments and its balance. */
export function GET(request: Request, { params }: Context): Promise<Response> {
  return answer(request, params, async (actor) => listDraws(actor, { jobId: (await params).job }));
}
