import { z } from 'zod';
import { DRAW_STATES } from './states';

/** How an attempt to pay stands, in our own words. */
export const PAYMENT_STATUSES = ['open', 'actionNeeded', 'processing', 'succeeded', 'canceled'] as const;
export type PaymentStatus = (typeof PAYMENT_STATUSES)[number];

/** What a webhook of the payment service tells: which object of whose account to look at again. */
export interface PaymentEvent {
  readonly id: string;
  readonly type: string;
  /** The connected account it belongs to; null for the platform's own. */
  readonly account: string | null;
  readonly objectId: string;
  /** The payment intent that the object is, or belongs to. */
  readonly intentId: string | null;
}

/** A payment intent as the service holds it at one moment. Sums are in cents. */
export interface IntentSnapshot {
  readonly id: string;
  readonly status: PaymentStatus;
  readonly amountCents: number;
  readonly receivedCents: number;
  readonly clientSecret: string;
  /** The charge that paid it; null while there is none that did. */
  readonly charge: {
    readonly id: string;
    readonly at: Date;
    readonly refundedCents: number;
    /** Whose money it was, such as "Visa" ending in 4242. */
    readonly by: { readonly name: string; readonly lastFour: string } | null;
  } | null;
  /** Why the last try failed. */
  readonly decline: { readonly code: string; readonly declineCode: string | null } | null;
  readonly metadata: Readonly<Record<string, string>>;
}

/** Money given back, as the service holds it. */
export interface RefundSnapshot {
  readonly id: string;
  readonly amountCents: number;
  readonly status: 'pending' | 'succeeded' | 'failed' | 'canceled';
  readonly at: Date;
}

const cents = z.number().int();
/** `YYYY-MM-DD` in the company's time zone. */
const calendarDate = z.iso.date();

/** One payment of the schedule as homeowner and staff see it. */
export const drawViewShape = z.object({
  id: z.uuid(),
  number: z.number().int().positive(),
  /** How many payments the schedule has. */
  of: z.number().int().positive(),
  label: z.string(),
  due: z.enum(['signing', 'released', 'materialsIn', 'installing', 'walkThrough']),
  amountCents: cents,
  state: z.enum(DRAW_STATES),
  paidOn: calendarDate.nullable(),
  /** What was received for it, and what of that was given back. */
  receivedCents: cents,
  refundedCents: cents,
  /** What the ledger says of its last payment, such as "Payment 1 of 4, Visa ending in 4242". */
  receipt: z.string().nullable(),
});
export type DrawView = z.infer<typeof drawViewShape>;

/** What a job's ledger adds up to. The balance is what is still owed; below zero, what is to be given back. */
export const balanceShape = z.object({
  agreedCents: cents,
  changesCents: cents,
  paidCents: cents,
  refundedCents: cents,
  balanceCents: cents,
});
export type Balance = z.infer<typeof balanceShape>;

export const scheduleViewShape = z.object({
  jobName: z.string(),
  draws: z.array(drawViewShape),
  balance: balanceShape,
});
export type ScheduleView = z.infer<typeof scheduleViewShape>;

export const drawInputShape = z.object({ drawId: z.uuid() });

/** All that the browser needs to show the card form. */
export const paymentStartShape = z.object({
  draw: drawViewShape,
  clientSecret: z.string(),
  publishableKey: z.string(),
  /** Null when the script comes from the service itself. */
  scriptUrl: z.string().nullable(),
  account: z.string(),
});
export type PaymentStart = z.infer<typeof paymentStartShape>;

/** The truth about a draw and its newest attempt, looked up at the service. */
export const paymentViewShape = z.object({
  draw: drawViewShape,
  attempt: z.object({ status: z.enum(PAYMENT_STATUSES), decline: z.string().nullable() }).nullable(),
});
export type PaymentView = z.infer<typeof paymentViewShape>;

export const refundInputShape = z.object({
  drawId: z.uuid(),
  amountCents: cents.positive(),
  reason: z.string().trim().min(1).max(500),
  /** Made once by the asking screen, so that a second click gives nothing back twice. */
  requestId: z.uuid(),
});

const DECLINES: Readonly<Record<string, string>> = {
  insufficient_funds:
    'The card has not enough money on it for this sum. Another card, or your bank, can help.',
  expired_card: 'The card has expired. Please use another card.',
  incorrect_cvc:
    'The security code does not match the card. Please check the three or four digits and try again.',
  incorrect_number: 'The card number is not right. Please check it and try again.',
  processing_error: 'The card could not be reached just now. Please try again in a few minutes.',
  card_velocity_exceeded:
    'The card has reached its limit for today. Your bank can raise it, or use another card.',
  authentication_required:
    'Your bank wants to be sure that it is you. Please try again and answer its question.',
  payment_intent_authentication_failure:
    'Your bank could not make sure that it was you. Please try again, or use another card.',
};

/** A refusal in plain words. Nothing was charged in any of these cases. */
export function declineSentence(code: string, declineCode: string | null): string {
  return (
    DECLINES[declineCode ?? ''] ??
    DECLINES[code] ??
    'The bank did not accept the card and gave no reason. Your bank can tell you more, or use another card.'
  );
}

/** A calendar date (`YYYY-MM-DD`) in full, such as "Tuesday, December 1, 2026". */
export const inFull = (date: string): string =>
  new Intl.DateTimeFormat('en-US', { dateStyle: 'full', timeZone: 'UTC' }).format(
    new Date(`${date}T12:00:00Z`),
  );

/** What a homeowner reads for a draw. */
export const drawName = ({ number, of }: Pick<DrawView, 'number' | 'of'>): string =>
  `Payment ${number} of ${of}`;

/** What the worker is told of a payment that was posted. */
export const receiptJobShape = z.object({ companyId: z.uuid(), ledgerId: z.uuid() });
