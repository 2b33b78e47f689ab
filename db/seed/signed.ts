import type { Guest, Member } from '@/lib/contracts/actor';
import type { JobView } from '@/lib/contracts/job';
import { environment } from '@/lib/adapters/environment';
import { reach, takeoff } from '@/lib/engine';
import type { ChoiceChange } from '@/lib/engine/types';
import { ZONES } from '@/lib/engine/types';
import { decideChangeOrder } from '@/lib/services/change-order/decide';
import { readChangeOrder } from '@/lib/services/change-order/read';
import { startChangeOrder } from '@/lib/services/change-order/start';
import { listDraws } from '@/lib/services/draw/list';
import { acceptInvitation } from '@/lib/services/invitation/accept';
import { issueInvitation } from '@/lib/services/invitation/send';
import { moveJobStage } from '@/lib/services/job/move-stage';
import { prepareOffer } from '@/lib/services/offer/prepare';
import { listPages } from '@/lib/services/page/list';
import { postPaymentEvent } from '@/lib/services/payment/post-event';
import { startPayment } from '@/lib/services/payment/start';
import { changeScheme } from '@/lib/services/scheme/change';
import { readKitchen } from '@/lib/services/scheme/read-kitchen';
import { resolveActor } from '@/lib/services/session/resolve-actor';
import { signOffer } from '@/lib/services/signature/sign';
import type { OfferView } from '@/lib/contracts/offer';
import { done } from './contractor';
import { ensureUser } from './sign-in';

const DAY_MS = 86_400_000;

/** Does something as if it were `days` ago. */
async function daysAgo<T>(days: number, work: () => Promise<T>): Promise<T> {
  const before = process.env.STILEWRIGHT_CLOCK;
  process.env.STILEWRIGHT_CLOCK = new Date(Date.now() - days * DAY_MS).toISOString();
  try {
    return await work();
  } finally {
    if (before === undefined) delete process.env.STILEWRIGHT_CLOCK;
    else process.env.STILEWRIGHT_CLOCK = before;
  }
}

interface Parts {
  readonly company: string;
  readonly ines: Member;
  readonly rowan: Member;
  readonly job: JobView;
  readonly household: { readonly name: string; readonly email: string };
  /** What the household asks for after signing: the first is approved, the second waits. */
  readonly changes: readonly [Wish, Wish];
}

interface Wish {
  readonly change: ChoiceChange;
  readonly reason: string;
}

/**
 * Brings a job from its proposal to the shop as people would: invited, signed, deposit paid, a change approved,
 * released, another change signed and waiting. Does nothing when a page is sealed already.
 */
export async function ensureSigned({ company, ines, rowan, job, household, changes }: Parts): Promise<void> {
  const { id: jobId } = job;
  if (done(await listPages(rowan, { jobId })).length > 0) return;
  const userId = await ensureUser(household);
  const guest = await daysAgo(52, async () => {
    const { token } = done(await issueInvitation(rowan, { jobId, ...household, signer: true }));
    const visitor = { userId, verifiedEmails: [household.email], name: household.name };
    done(await acceptInvitation(visitor, { slug: company, token }));
    const actor = await resolveActor({ slug: company, clerkUserId: userId, jobId });
    if (actor?.kind !== 'guest') throw new Error(`${household.name} did not come in.`);
    return actor;
  });
  await daysAgo(50, async () => {
    const [scheme] = done(await readKitchen(guest, { jobId })).schemes;
    if (!scheme) throw new Error('There is no proposal to sign.');
    await sign(guest, done(await prepareOffer(guest, { jobId, schemeId: scheme.id })));
    await payDeposit(guest, jobId);
  });
  const [first, second] = changes;
  await daysAgo(44, async () => {
    const orderId = await ask(guest, jobId, first);
    done(await decideChangeOrder(ines, { jobId, orderId, decision: 'approve' }));
  });
  await daysAgo(40, async () => void done(await moveJobStage(rowan, { jobId, to: 'released' })));
  await daysAgo(2, () => ask(guest, jobId, second));
}

async function sign(guest: Guest, offer: OfferView): Promise<void> {
  done(
    await signOffer(guest, {
      jobId: guest.jobId,
      offerId: offer.id,
      sha256: offer.sha256,
      consent: { accepted: true, sha256: offer.body.consent.sha256 },
      means: { kind: 'typed', text: guest.name },
    }),
  );
}

/** Chooses something else, asks for it and signs it; the order's id. */
async function ask(guest: Guest, jobId: string, { change, reason }: Wish): Promise<string> {
  const { schemes, survey, edition, terms } = done(await readKitchen(guest, { jobId }));
  const [scheme] = schemes;
  if (!scheme) throw new Error('There is no scheme to change.');
  const wanted = reach(edition, scheme.choices, change, ZONES);
  done(
    await changeScheme(guest, {
      jobId,
      schemeId: scheme.id,
      version: scheme.version,
      changes: [change, ...wanted.swaps],
      totalCents: takeoff(survey, edition, wanted.choices, terms).total,
    }),
  );
  const { id: orderId } = done(await startChangeOrder(guest, { jobId, schemeId: scheme.id, reason }));
  await sign(guest, done(await readChangeOrder(guest, { jobId, orderId })).offer);
  return orderId;
}

/** Pays the first payment with the service's test card, and books it as its webhook would. */
async function payDeposit(guest: Guest, jobId: string): Promise<void> {
  const [draw] = done(await listDraws(guest, { jobId })).draws;
  if (!draw) throw new Error('There is nothing to pay.');
  const { clientSecret, account } = done(await startPayment(guest, { drawId: draw.id }));
  const intentId = clientSecret.split('_secret_')[0] ?? '';
  const { STRIPE_API_BASE, STRIPE_SECRET_KEY } = environment();
  if (!STRIPE_API_BASE) throw new Error('The demo pays through the local stand-in alone.');
  const answer = await fetch(`${STRIPE_API_BASE}/v1/payment_intents/${intentId}/confirm`, {
    method: 'POST',
    headers: {
      authorization: `Bearer ${STRIPE_SECRET_KEY}`,
      'stripe-account': account,
      'content-type': 'application/x-www-form-urlencoded',
    },
    body: 'payment_method=pm_card_visa',
  });
  if (!answer.ok) throw new Error(`The deposit was not paid: ${await answer.text()}`);
  await postPaymentEvent({
    id: `seed/${intentId}`,
    type: 'payment_intent.succeeded',
    account,
    objectId: intentId,
    intentId,
  });
}
