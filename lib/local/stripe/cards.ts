/** What happens to a card number when it is charged. */
export type CardOutcome =
  | { readonly kind: 'pays' }
  | { readonly kind: 'asks' }
  | {
      readonly kind: 'declines';
      readonly code: string;
      readonly declineCode?: string;
      readonly message: string;
    };

export interface Card {
  readonly number: string;
  readonly brand: 'visa' | 'mastercard';
  readonly outcome: CardOutcome;
}

/** A bank debit is on its way for days; how it ends is decided when a test lets it arrive. */
export interface Debit {
  readonly lastFour: string;
  readonly refusal: Extract<CardOutcome, { kind: 'declines' }> | null;
}

const declines = (code: string, message: string, declineCode?: string) => ({
  kind: 'declines' as const,
  code,
  declineCode,
  message,
});

/** Source of numbers, codes and messages: the payment service's published list of test cards. */
export const CARDS: readonly Card[] = [
  { number: '4242424242424242', brand: 'visa', outcome: { kind: 'pays' } },
  { number: '5555555555554444', brand: 'mastercard', outcome: { kind: 'pays' } },
  {
    number: '4000000000000002',
    brand: 'visa',
    outcome: declines('card_declined', 'Your card was declined.', 'generic_decline'),
  },
  {
    number: '4000000000009995',
    brand: 'visa',
    outcome: declines('card_declined', 'Your card has insufficient funds.', 'insufficient_funds'),
  },
  {
    number: '4000000000000069',
    brand: 'visa',
    outcome: declines('expired_card', 'Your card has expired.', 'expired_card'),
  },
  {
    number: '4000000000000127',
    brand: 'visa',
    outcome: declines('incorrect_cvc', "Your card's security code is incorrect.", 'incorrect_cvc'),
  },
  { number: '4000002500003155', brand: 'visa', outcome: { kind: 'asks' } },
  { number: '4000002760003184', brand: 'visa', outcome: { kind: 'asks' } },
];

/** Names by which a server may pay without a browser. */
export const METHOD_TOKENS: Readonly<Record<string, string>> = {
  pm_card_visa: '4242424242424242',
  pm_card_mastercard: '5555555555554444',
  pm_card_chargeDeclined: '4000000000000002',
  pm_card_visa_chargeDeclined: '4000000000000002',
  pm_card_visa_chargeDeclinedInsufficientFunds: '4000000000009995',
  pm_card_chargeDeclinedExpiredCard: '4000000000000069',
  pm_card_chargeDeclinedIncorrectCvc: '4000000000000127',
  pm_card_authenticationRequired: '4000002760003184',
};

/** Source of the names: the payment service's list of test bank accounts. */
export const DEBIT_TOKENS: Readonly<Record<string, Debit>> = {
  pm_usBankAccount_success: { lastFour: '6789', refusal: null },
  pm_usBankAccount_insufficientFunds: {
    lastFour: '2227',
    refusal: declines(
      'insufficient_funds',
      'The customer’s account has insufficient funds to cover this payment.',
    ),
  },
};

export const findCard = (number: string): Card | undefined =>
  CARDS.find((card) => card.number === number.replace(/\s/g, ''));
