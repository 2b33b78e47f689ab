import { describe, expect, it } from 'vitest';
import { leftover, phaseAfterLook } from '@/components/payment/pay-phase';
import { balanceSentences, formatCents, refundSentence, stateSentence } from '@/components/payment/words';
import {
  declineSentence,
  inFull,
  type Balance,
  type DrawView,
  type PaymentStart,
  type PaymentView,
} from '@/lib/contracts/payment';
import { CARDS } from '@/lib/local/stripe/cards';
import { composeReceipt } from '@/lib/services/payment/compose-receipt';

const draw: DrawView = {
  id: '7c9e6679-7425-40de-944b-e07fc1f90ae7',
  number: 2,
  of: 4,
  label: 'Materials',
  due: 'materialsIn',
  amountCents: 312_050,
  state: 'planned',
  paidOn: null,
  receivedCents: 0,
  refundedCents: 0,
  receipt: null,
};
const balance: Balance = {
  agreedCents: 1_040_000,
  changesCents: 0,
  paidCents: 0,
  refundedCents: 0,
  balanceCents: 1_040_000,
};

describe('sums and dates', () => {
  it('are told in full', () => {
    expect(formatCents(312_050)).toBe('$3,120.50');
    // Source: perpetual calendar; the first of December 2026 is a Tuesday.
    expect(inFull('2026-12-01')).toBe('Tuesday, December 1, 2026');
  });

  it('a payment says when it is due, or when it was paid', () => {
    expect(stateSentence(draw)).toBe('Due when the materials are in.');
    expect(stateSentence({ ...draw, state: 'paid', paidOn: '2026-12-01' })).toBe(
      'Paid on Tuesday, December 1, 2026.',
    );
  });

  it('what was given back is told as a part or as all of it', () => {
    expect(refundSentence(draw)).toBeNull();
    expect(refundSentence({ ...draw, receivedCents: 312_050, refundedCents: 50 })).toBe(
      '$0.50 of it was given back.',
    );
    expect(refundSentence({ ...draw, receivedCents: 312_050, refundedCents: 312_050 })).toBe(
      'All of it, $3,120.50, was given back.',
    );
  });

  it('the sum to date names agreement, changes, payments and what is open', () => {
    expect(balanceSentences({ ...balance, agreedCents: 0, balanceCents: 0 })).toEqual([
      'Nothing is signed yet, so nothing is owed.',
    ]);
    const course = { ...balance, changesCents: -40_000, paidCents: 312_000, balanceCents: 688_000 };
    expect(balanceSentences(course)).toEqual([
      'The agreed sum is $10,000.00: $10,400.00 by the agreement and $400.00 less by change orders.',
      '$3,120.00 has been paid so far.',
      '$6,880.00 is still to be paid.',
    ]);
    expect(balanceSentences({ ...balance, paidCents: 1_050_000, balanceCents: -10_000 }).at(-1)).toBe(
      '$100.00 is to be given back to you.',
    );
  });
});

describe('declines', () => {
  it('every card that the service lists as refused has its own plain sentence, except the one without a reason', () => {
    const sentences = CARDS.flatMap(({ outcome }) =>
      outcome.kind === 'declines' ? [declineSentence(outcome.code, outcome.declineCode ?? null)] : [],
    );
    expect(new Set(sentences).size).toBe(sentences.length);
    expect(declineSentence('card_declined', 'generic_decline')).toContain('gave no reason');
    for (const sentence of sentences) expect(sentence).not.toMatch(/_|!|Stripe|error/i);
  });
});

describe('after a look at the truth', () => {
  const start: PaymentStart = {
    draw: { ...draw, state: 'due' },
    clientSecret: 'pi_1_secret_1',
    publishableKey: 'pk_test_1',
    scriptUrl: null,
    account: 'acct_ternhollow',
  };
  const view = (attempt: PaymentView['attempt'], state: DrawView['state'] = 'due'): PaymentView => ({
    draw: { ...draw, state },
    attempt,
  });

  it('a payment that was taken is waited for, form or no form', () => {
    for (const status of ['succeeded', 'processing'] as const) {
      expect(phaseAfterLook(view({ status, decline: null }), start).kind).toBe('waiting');
      expect(phaseAfterLook(view({ status, decline: null }), null).kind).toBe('waiting');
    }
    expect(phaseAfterLook(view(null, 'paid'), start).kind).toBe('waiting');
  });

  it('a payment that was not taken leaves the same form open and says that nothing was charged', () => {
    const open = phaseAfterLook(view({ status: 'open', decline: null }), start);
    expect(open).toMatchObject({ kind: 'ready', start });
    expect(open.kind === 'ready' && open.notice).toContain('Nothing was charged');
    const unanswered = phaseAfterLook(view({ status: 'actionNeeded', decline: null }), start);
    expect(unanswered.kind === 'ready' && unanswered.notice).toContain('nothing was charged');
    const declined = phaseAfterLook(view({ status: 'open', decline: 'The card has expired.' }), start);
    expect(declined.kind === 'ready' && declined.notice).toBe('The card has expired.');
  });

  it('a first visit has nothing to say', () => {
    expect(leftover(view(null))).toBeNull();
    expect(phaseAfterLook(view(null), null)).toEqual({ kind: 'starting', notice: null });
  });
});

describe('the receipt', () => {
  const words = (rest: Partial<Balance>) =>
    composeReceipt({
      contractor: { name: 'Tern Hollow Cabinet Refacing', phone: '(555) 010-0142' },
      jobName: 'Sorrel Lane',
      draw: { ...draw, number: 1, label: 'Deposit' },
      receivedCents: 312_000,
      receivedOn: '2026-12-01',
      memo: 'Payment 1 of 4, Visa ending in 4242',
      balance: { ...balance, ...rest },
    });

  it('names the payment, the sum, the day, the card and what is still open', () => {
    const { subject, text } = words({ paidCents: 312_000, balanceCents: 728_000 });
    expect(subject).toBe('Payment 1 of 4 received');
    for (const part of ['$3,120.00', 'Tuesday, December 1, 2026', 'ending in 4242', '$7,280.00']) {
      expect(text).toContain(part);
    }
  });

  it('says so when it was the last', () => {
    expect(words({ balanceCents: 0 }).text).toContain('everything that was agreed is paid');
  });
});
