import { takeClerkWebhook } from '@/lib/services/person/take-clerk-webhook';

/** Takes the sign-in service's events. The body is read as it came, because the signature is over its bytes. */
export async function POST(request: Request): Promise<Response> {
  return new Response(null, { status: await takeClerkWebhook(request) });
}
