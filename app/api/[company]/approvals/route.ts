import { answer } from '@/app/api/answer';
import { listApprovals } from '@/lib/services/approval/list';

interface Context {
  readonly params: Promise<{ company: string }>;
}

/** Signed change orders that wait for the owner. */
export function GET(request: Request, { params }: Context): Promise<Response> {
  return answer(request, params, listApprovals);
}
