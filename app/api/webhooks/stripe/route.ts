import { takePaymentWebhook } from '@/lib/services/payment/take-webhook';

/** Takes the payment service's events. The body is read as it came, because the signature is over its bytes. */
export async function POST(request: Request): Promise<Response> {
  const status = await takePaymentWebhook(
    await request.text(),
    request.headers.get('stripe-signature') ?? '',
  );
  return new Response(null, { status });
}
