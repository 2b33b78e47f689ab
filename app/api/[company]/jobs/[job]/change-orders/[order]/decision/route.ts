import { answer } from '@/app/api/answer';
import { decideChangeOrder } from '@/lib/services/change-order/decide';

interface Context {
  readonly params: Promise<{ company: string; job: string; order: string }>;
}

/** The owner's decision: `{ decision: 'approve' | 'decline', reason }`. */
export function POST(request: Request, { params }: Context): Promise<Response> {
  return answer(request, params, async (actor, body) => {
    const { job, order } = await params;
    return decideChangeOrder(actor, { ...Object(body), jobId: job, orderId: order });
  });
}
