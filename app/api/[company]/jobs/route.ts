import { answer } from '@/app/api/answer';
import { createJob } from '@/lib/services/job/create';
import { listJobs } from '@/lib/services/job/list';

interface Context {
  readonly params: Promise<{ company: string }>;
}

/** The desk's list of jobs. */
export function GET(request: Request, { params }: Context): Promise<Response> {
  return answer(request, params, listJobs);
}

/** Opens a job. */
export function POST(request: Request, { params }: Context): Promise<Response> {
  return answer(request, params, createJob);
}
