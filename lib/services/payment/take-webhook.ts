import { verifyStripeWebhook } from '@/lib/adapters/stripe';
import { postPaymentEvent } from './post-event';

/**
 * Checks and posts one delivery. 400: the signature does not hold, nothing was read. 200: taken, or nothing to
 * take. 503: not now, send it again.
 */
export async function takePaymentWebhook(rawBody: string, signature: string): Promise<200 | 400 | 503> {
  const event = verifyStripeWebhook(rawBody, signature);
  if (!event) return 400;
  try {
    await postPaymentEvent(event);
    return 200;
  } catch (error) {
    console.error(`webhook ${event.id} (${event.type}) was not posted:`, error);
    return 503;
  }
}
