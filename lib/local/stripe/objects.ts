import { randomBytes } from 'node:crypto';
import { z } from 'zod';

/** The API version that the server library pins. */
export const API_VERSION = '2026-10-28.endive';

const metadata = z.record(z.string(), z.string());
const unix = z.number().int();

export const customerShape = z.object({
  id: z.string(),
  object: z.literal('customer'),
  created: unix,
  email: z.string().nullable(),
  name: z.string().nullable(),
  description: z.string().nullable(),
  livemode: z.literal(false),
  metadata,
});
export type Customer = z.infer<typeof customerShape>;

export const accountShape = z.object({
  id: z.string(),
  object: z.literal('account'),
  created: unix,
  type: z.string(),
  country: z.string(),
  default_currency: z.string(),
  email: z.string().nullable(),
  charges_enabled: z.boolean(),
  payouts_enabled: z.boolean(),
  details_submitted: z.boolean(),
  metadata,
});
export type Account = z.infer<typeof accountShape>;

const bankAccountShape = z.object({ bank_name: z.string(), last4: z.string() });

export const paymentMethodShape = z.object({
  id: z.string(),
  object: z.literal('payment_method'),
  type: z.enum(['card', 'us_bank_account']),
  created: unix,
  livemode: z.literal(false),
  billing_details: z.object({ name: z.string().nullable(), email: z.string().nullable() }),
  card: z
    .object({
      brand: z.string(),
      last4: z.string(),
      exp_month: z.number(),
      exp_year: z.number(),
      country: z.string(),
      funding: z.string(),
    })
    .optional(),
  us_bank_account: bankAccountShape.optional(),
});
export type PaymentMethod = z.infer<typeof paymentMethodShape>;

export const paymentErrorShape = z.object({
  type: z.string(),
  code: z.string(),
  decline_code: z.string().optional(),
  message: z.string(),
  charge: z.string().optional(),
  payment_method: paymentMethodShape.optional(),
});
export type PaymentError = z.infer<typeof paymentErrorShape>;

export const INTENT_STATUSES = [
  'requires_payment_method',
  'requires_confirmation',
  'requires_action',
  'processing',
  'requires_capture',
  'canceled',
  'succeeded',
] as const;

export const paymentIntentShape = z.object({
  id: z.string(),
  object: z.literal('payment_intent'),
  amount: z.number().int(),
  amount_capturable: z.number().int(),
  amount_received: z.number().int(),
  automatic_payment_methods: z.object({ enabled: z.boolean(), allow_redirects: z.string() }).nullable(),
  canceled_at: unix.nullable(),
  cancellation_reason: z.string().nullable(),
  capture_method: z.string(),
  client_secret: z.string(),
  confirmation_method: z.string(),
  created: unix,
  currency: z.string(),
  customer: z.string().nullable(),
  description: z.string().nullable(),
  last_payment_error: paymentErrorShape.nullable(),
  latest_charge: z.string().nullable(),
  livemode: z.literal(false),
  metadata,
  next_action: z.object({ type: z.string(), use_stripe_sdk: z.record(z.string(), z.string()) }).nullable(),
  payment_method: z.string().nullable(),
  payment_method_types: z.array(z.string()),
  receipt_email: z.string().nullable(),
  status: z.enum(INTENT_STATUSES),
});
export type PaymentIntent = z.infer<typeof paymentIntentShape>;

export const chargeShape = z.object({
  id: z.string(),
  object: z.literal('charge'),
  amount: z.number().int(),
  amount_captured: z.number().int(),
  amount_refunded: z.number().int(),
  captured: z.boolean(),
  created: unix,
  currency: z.string(),
  customer: z.string().nullable(),
  description: z.string().nullable(),
  disputed: z.boolean(),
  failure_code: z.string().nullable(),
  failure_message: z.string().nullable(),
  livemode: z.literal(false),
  metadata,
  paid: z.boolean(),
  payment_intent: z.string(),
  payment_method: z.string(),
  payment_method_details: z.object({
    type: z.enum(['card', 'us_bank_account']),
    card: z
      .object({ brand: z.string(), last4: z.string(), exp_month: z.number(), exp_year: z.number() })
      .optional(),
    us_bank_account: bankAccountShape.optional(),
  }),
  receipt_email: z.string().nullable(),
  refunded: z.boolean(),
  status: z.enum(['succeeded', 'pending', 'failed']),
});
export type Charge = z.infer<typeof chargeShape>;

export const refundShape = z.object({
  id: z.string(),
  object: z.literal('refund'),
  amount: z.number().int(),
  charge: z.string(),
  created: unix,
  currency: z.string(),
  metadata,
  payment_intent: z.string(),
  reason: z.string().nullable(),
  status: z.enum(['pending', 'succeeded', 'failed', 'canceled']),
});
export type Refund = z.infer<typeof refundShape>;

export const eventShape = z.object({
  id: z.string(),
  object: z.literal('event'),
  account: z.string().optional(),
  api_version: z.string(),
  created: unix,
  data: z.object({ object: z.record(z.string(), z.unknown()) }),
  livemode: z.literal(false),
  pending_webhooks: z.number().int(),
  request: z.object({ id: z.string().nullable(), idempotency_key: z.string().nullable() }),
  type: z.string(),
});
export type ApiEvent = z.infer<typeof eventShape>;

export const nowUnix = () => Math.floor(Date.now() / 1000);

const LETTERS = 'ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789';

/** An id such as `pi_…` with 24 random letters and digits. */
export const newId = (prefix: string): string =>
  `${prefix}_${[...randomBytes(24)].map((byte) => LETTERS[byte % LETTERS.length]).join('')}`;

export const newAccount = (id: string, more: Partial<Account> = {}): Account => ({
  id,
  object: 'account',
  created: nowUnix(),
  type: 'standard',
  country: 'US',
  default_currency: 'usd',
  email: null,
  charges_enabled: true,
  payouts_enabled: true,
  details_submitted: true,
  metadata: {},
  ...more,
});
