import { verifyClerkWebhook } from '@/lib/adapters/clerk';
import { syncClerkEvent } from './sync-clerk-event';

/**
 * Takes one delivery of the sign-in service and answers the HTTP status: 400 when its signature does not hold, and
 * then nothing is stored; 200 when it was taken, was known, or is not ours. Throws when it should come again.
 */
export async function takeClerkWebhook(request: Request): Promise<number> {
  const event = await verifyClerkWebhook(request);
  if (!event) return 400;
  await syncClerkEvent(event);
  return 200;
}
