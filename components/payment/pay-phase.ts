import type { PaymentStart, PaymentView } from '@/lib/contracts/payment';

/** Where the payer is, as far as this browser knows. The draw's own state comes before it. */
export type Phase =
  /** The form is being fetched; `notice` says why an earlier try did not pay. */
  | { readonly kind: 'starting'; readonly notice: string | null }
  | { readonly kind: 'ready'; readonly start: PaymentStart; readonly notice: string | null }
  /** The card, and perhaps the bank, is being asked. */
  | { readonly kind: 'asking'; readonly start: PaymentStart }
  /** Charged, or the bank is at it; the webhook tells when it has arrived. */
  | { readonly kind: 'waiting' }
  /** The truth is being looked up. */
  | { readonly kind: 'looking'; readonly start: PaymentStart | null }
  | { readonly kind: 'lost'; readonly start: PaymentStart | null }
  | { readonly kind: 'cannot'; readonly sentence: string };

export const SENTENCES = {
  cannotLoad:
    'The card form could not be fetched. Nothing was charged. Please check the connection and try again.',
  notAnswered: 'The bank’s question was not answered, so nothing was charged. You can try again.',
  moved: 'The sum of this payment has just changed. Nothing was charged. Please look at the new sum first.',
  untouched: 'The connection was lost before the card was charged. Nothing was charged. You can try again.',
  lost: 'The connection was lost, and it cannot be seen from here whether the card was charged. The form stays closed until that is known, so that you are never charged twice.',
} as const;

const isSent = ({ attempt }: PaymentView) =>
  attempt?.status === 'succeeded' || attempt?.status === 'processing';

/** Why an earlier attempt did not pay, or null when there is nothing to say. */
export const leftover = ({ attempt }: PaymentView): string | null =>
  attempt?.decline ?? (attempt?.status === 'actionNeeded' ? SENTENCES.notAnswered : null);

/** What the looked-up truth means for a payer who may still have the form open. */
export function phaseAfterLook(view: PaymentView, start: PaymentStart | null): Phase {
  if (view.draw.state !== 'due' || isSent(view)) return { kind: 'waiting' };
  if (!start) return { kind: 'starting', notice: leftover(view) };
  return { kind: 'ready', start, notice: leftover(view) ?? SENTENCES.untouched };
}
