import { answer } from '@/app/api/answer';
import { readChangeOrder } from '@/lib/services/change-order/read';
import { withdrawChangeOrder } from '@/lib/services/change-order/withdraw';

interface Context {
  readonly params: Promise<{ company: string; job: string; order: string }>;
}

/** One change order with its offer. */
export function GET(request: Request, { params }: Context): Promise<Response> {
  return answer(request, params, async (actor) => {
    const { job, order } = await params;
    return readChangeOrder(actor, { jobId: job, orderId: order });
  });
}

/** Takes a change order back. */
export function DELETE(request: Request, { params }: Context): Promise<Response> {
  return answer(request, params, async (actor) => {
    const { job, order } = await params;
    return withdrawChangeOrder(actor, { jobId: job, orderId: order });
  });
}
