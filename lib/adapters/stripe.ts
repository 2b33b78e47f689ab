import Stripe from 'stripe';
import type { IntentSnapshot, PaymentEvent, PaymentStatus, RefundSnapshot } from '@/lib/contracts/payment';
import { environment } from './environment';

/** Why the payment service did not do what was asked. */
export class PaymentServiceFault extends Error {
  constructor(
    /** `unavailable` may be tried again; `refused` and `notFound` would be answered the same. */
    readonly kind: 'unavailable' | 'refused' | 'notFound',
    readonly code: string | null,
    message: string,
  ) {
    super(message);
    this.name = 'PaymentServiceFault';
  }
}

const TIMEOUT_MS = 10_000;
let held: { key: string; base: string | undefined; stripe: Stripe } | undefined;

function client(): Stripe {
  const { STRIPE_SECRET_KEY: key, STRIPE_API_BASE: base } = environment();
  if (held?.key === key && held.base === base) return held.stripe;
  const at = base ? new URL(base) : null;
  const stripe = new Stripe(key, {
    maxNetworkRetries: 2,
    timeout: TIMEOUT_MS,
    ...(at && {
      host: at.hostname,
      port: at.port || (at.protocol === 'http:' ? 80 : 443),
      protocol: at.protocol === 'http:' ? ('http' as const) : ('https' as const),
      telemetry: false,
    }),
  });
  held = { key, base, stripe };
  return stripe;
}

async function ask<T>(work: (stripe: Stripe) => Promise<T>): Promise<T> {
  try {
    return await work(client());
  } catch (error) {
    if (!(error instanceof Stripe.errors.StripeError)) throw error;
    const lost =
      error instanceof Stripe.errors.StripeConnectionError ||
      error instanceof Stripe.errors.StripeAPIError ||
      error instanceof Stripe.errors.StripeRateLimitError;
    const kind = lost ? 'unavailable' : error.statusCode === 404 ? 'notFound' : 'refused';
    throw new PaymentServiceFault(kind, error.code ?? null, error.message);
  }
}

const STATUSES: Readonly<Record<string, PaymentStatus>> = {
  requires_payment_method: 'open',
  requires_confirmation: 'open',
  requires_action: 'actionNeeded',
  requires_capture: 'processing',
  processing: 'processing',
  succeeded: 'succeeded',
  canceled: 'canceled',
};

const CARD_NAMES: Readonly<Record<string, string>> = {
  amex: 'American Express',
  diners: 'Diners Club',
  discover: 'Discover',
  jcb: 'JCB',
  mastercard: 'Mastercard',
  unionpay: 'UnionPay',
  visa: 'Visa',
};

function payerOf(details: Stripe.Charge.PaymentMethodDetails | null) {
  const { card, us_bank_account: bank } = details ?? {};
  if (card?.last4) return { name: CARD_NAMES[card.brand ?? ''] ?? 'Card', lastFour: card.last4 };
  return bank?.last4 ? { name: 'Bank account', lastFour: bank.last4 } : null;
}

function chargeOf(intent: Stripe.PaymentIntent): IntentSnapshot['charge'] {
  const charge = intent.latest_charge;
  if (!charge || typeof charge === 'string' || charge.status !== 'succeeded') return null;
  return {
    id: charge.id,
    at: new Date(charge.created * 1000),
    refundedCents: charge.amount_refunded,
    by: payerOf(charge.payment_method_details),
  };
}

function snapshot(intent: Stripe.PaymentIntent): IntentSnapshot {
  const error = intent.last_payment_error;
  return {
    id: intent.id,
    // A status that is not known here is no reason to let someone pay again.
    status: STATUSES[intent.status] ?? 'processing',
    amountCents: intent.amount,
    receivedCents: intent.amount_received,
    clientSecret: intent.client_secret ?? '',
    charge: chargeOf(intent),
    decline: error ? { code: error.code ?? 'unknown', declineCode: error.decline_code ?? null } : null,
    metadata: intent.metadata,
  };
}

/** Every object belongs to one company's connected account. */
interface Owned {
  readonly account: string;
}

/**
 * Creates a payment intent in US dollars, or returns the one that was created with the same `idempotencyKey`.
 * Every parameter must then be the same too. Throws {@link PaymentServiceFault}.
 */
export async function createPaymentIntent(
  asked: Owned & {
    readonly amountCents: number;
    readonly drawId: string;
    readonly idempotencyKey: string;
    readonly description: string;
    readonly receiptEmail: string | null;
    readonly metadata: Readonly<Record<string, string>>;
  },
): Promise<IntentSnapshot> {
  const intent = await ask((stripe) =>
    stripe.paymentIntents.create(
      {
        amount: asked.amountCents,
        currency: 'usd',
        automatic_payment_methods: { enabled: true },
        description: asked.description,
        ...(asked.receiptEmail ? { receipt_email: asked.receiptEmail } : {}),
        metadata: { ...asked.metadata, draw_id: asked.drawId },
      },
      { stripeAccount: asked.account, idempotencyKey: asked.idempotencyKey },
    ),
  );
  return snapshot(intent);
}

/** Reads a payment intent with the charge that paid it. Throws {@link PaymentServiceFault}. */
export async function retrievePaymentIntent({
  account,
  intentId,
}: Owned & { readonly intentId: string }): Promise<IntentSnapshot> {
  const intent = await ask((stripe) =>
    stripe.paymentIntents.retrieve(intentId, { expand: ['latest_charge'] }, { stripeAccount: account }),
  );
  return snapshot(intent);
}

/** Makes an intent that is not paid unpayable. Throws {@link PaymentServiceFault} when it is paid already. */
export async function cancelPaymentIntent({
  account,
  intentId,
}: Owned & { readonly intentId: string }): Promise<IntentSnapshot> {
  const intent = await ask((stripe) =>
    stripe.paymentIntents.cancel(
      intentId,
      {},
      { stripeAccount: account, idempotencyKey: `cancel/${intentId}` },
    ),
  );
  return snapshot(intent);
}

function refundSnapshot(refund: Stripe.Refund): RefundSnapshot {
  const { status } = refund;
  const settled = status === 'succeeded' || status === 'failed' || status === 'canceled';
  return {
    id: refund.id,
    amountCents: refund.amount,
    status: settled ? status : 'pending',
    at: new Date(refund.created * 1000),
  };
}

/** Gives back `amountCents` of a paid intent. Throws {@link PaymentServiceFault}. */
export async function createRefund(
  asked: Owned & {
    readonly intentId: string;
    readonly amountCents: number;
    readonly idempotencyKey: string;
    readonly metadata: Readonly<Record<string, string>>;
  },
): Promise<RefundSnapshot> {
  const refund = await ask((stripe) =>
    stripe.refunds.create(
      { payment_intent: asked.intentId, amount: asked.amountCents, metadata: { ...asked.metadata } },
      { stripeAccount: asked.account, idempotencyKey: asked.idempotencyKey },
    ),
  );
  return refundSnapshot(refund);
}

/** All refunds of an intent, at most 100, newest first. Throws {@link PaymentServiceFault}. */
export async function listRefunds({
  account,
  intentId,
}: Owned & { readonly intentId: string }): Promise<RefundSnapshot[]> {
  const list = await ask((stripe) =>
    stripe.refunds.list({ payment_intent: intentId, limit: 100 }, { stripeAccount: account }),
  );
  return list.data.map(refundSnapshot);
}

/** What the browser may know: the publishable key, and where the script is when not at the service itself. */
export function publicPaymentSettings(): { publishableKey: string; scriptUrl: string | null } {
  const { STRIPE_PUBLISHABLE_KEY, STRIPE_SCRIPT_URL } = environment();
  return { publishableKey: STRIPE_PUBLISHABLE_KEY, scriptUrl: STRIPE_SCRIPT_URL ?? null };
}

const textOf = (object: object, key: string): string | null => {
  const value: unknown = Reflect.get(object, key);
  return typeof value === 'string' ? value : null;
};

/**
 * Checks the signature over the body exactly as it came (HMAC-SHA256 with the endpoint's secret, at most five
 * minutes old) and reads the event. Null when the signature does not hold.
 */
export function verifyStripeWebhook(rawBody: string, signature: string): PaymentEvent | null {
  try {
    const event = client().webhooks.constructEvent(rawBody, signature, environment().STRIPE_WEBHOOK_SECRET);
    const { object } = event.data;
    const objectId = textOf(object, 'id');
    if (objectId === null) return null;
    return {
      id: event.id,
      type: event.type,
      account: event.account ?? null,
      objectId,
      intentId: textOf(object, 'object') === 'payment_intent' ? objectId : textOf(object, 'payment_intent'),
    };
  } catch (error) {
    if (error instanceof Stripe.errors.StripeSignatureVerificationError || error instanceof SyntaxError)
      return null;
    throw error;
  }
}
