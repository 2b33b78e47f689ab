import { answer } from '@/app/api/answer';
import { listChangeOrders } from '@/lib/services/change-order/list';
import { startChangeOrder } from '@/lib/services/change-order/start';

interface Context {
  readonly params: Promise<{ company: string; job: string }>;
}

/** A job's change orders. */
export function GET(request: Request, { params }: Context): Promise<Response> {
  return answer(request, params, async (actor) => listChangeOrders(actor, { jobId: (await params).job }));
}

/** Asks for a change: `{ schemeId, reason }`. */
export function POST(request: Request, { params }: Context): Promise<Response> {
  return answer(request, params, async (actor, body) =>
    startChangeOrder(actor, { ...Object(body), jobId: (await params).job }),
  );
}
