/** Only where something stands in for a real service may somebody else say what time it is. */
const mayBeSet = () => process.env.NODE_ENV !== 'production' || Boolean(process.env.STRIPE_API_BASE);

/** This instant. `STILEWRIGHT_CLOCK` (an ISO instant) stops the clock there, never beside real services. */
export function now(): Date {
  const set = process.env.STILEWRIGHT_CLOCK;
  if (!set || !mayBeSet()) return new Date();
  const instant = new Date(set);
  if (Number.isNaN(instant.getTime())) throw new Error(`STILEWRIGHT_CLOCK is no instant: ${set}`);
  return instant;
}
