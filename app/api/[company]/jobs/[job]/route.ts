import { answer } from '@/app/api/answer';
import { moveJobStage } from '@/lib/services/job/move-stage';
import { readJob } from '@/lib/services/job/read';

interface Context {
  readonly params: Promise<{ company: string; job: string }>;
}

/** One job. */
export function GET(request: Request, { params }: Context): Promise<Response> {
  return answer(request, params, async (actor) => readJob(actor, { jobId: (await params).job }));
}

/** Moves a job to another stage: `{ to }`. */
export function PATCH(request: Request, { params }: Context): Promise<Response> {
  return answer(request, params, async (actor, body) =>
    moveJobStage(actor, { ...Object(body), jobId: (await params).job }),
  );
}
