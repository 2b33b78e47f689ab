import { answer } from '@/app/api/answer';
import { readPayment } from '@/lib/services/payment/read';
import { startPayment } from '@/lib/services/payment/start';

interface Context {
  readonly params: Promise<{ company: string; job: string; draw: string }>;
}

/** How a draw and its newest attempt stand, looked up at the payment service. */
export function GET(request: Request, { params }: Context): Promise<Response> {
  return answer(request, params, async (actor) => readPayment(actor, { drawId: (await params).draw }));
}

/** Gets the card form ready for a draw that is due. */
export function POST(request: Request, { params }: Context): Promise<Response> {
  return answer(request, params, async (actor) => startPayment(actor, { drawId: (await params).draw }));
}
