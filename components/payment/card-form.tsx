'use client';

import { Elements, PaymentElement, useElements, useStripe } from '@stripe/react-stripe-js';
import type { Appearance, Stripe, StripeError } from '@stripe/stripe-js';
import { useEffect, useMemo, useState, type FormEvent } from 'react';
import { Button } from '@/components/ui/button';
import { declineSentence, type PaymentStart } from '@/lib/contracts/payment';
import { readAppearance } from './appearance';
import { FetchingForm } from './pay-states';
import { loadPaymentScript } from './load-stripe';
import { formatCents } from './words';

/** What came of one press on "Pay". */
export type Outcome =
  /** The card was charged, or the bank is at it; the webhook tells when it has arrived. */
  | { readonly kind: 'sent' }
  | { readonly kind: 'declined'; readonly sentence: string }
  /** Something in the form is still missing; it says so itself. */
  | { readonly kind: 'incomplete' }
  /** Nobody knows from here; the truth has to be looked up. */
  | { readonly kind: 'unknown' };

/** Follows the system's change between light and dark. */
function useAppearance(): Appearance {
  const [appearance, setAppearance] = useState(readAppearance);
  useEffect(() => {
    const dark = window.matchMedia('(prefers-color-scheme: dark)');
    const change = () => setAppearance(readAppearance());
    dark.addEventListener('change', change);
    return () => dark.removeEventListener('change', change);
  }, []);
  return appearance;
}

function outcomeOf(error: StripeError): Outcome {
  if (error.type === 'validation_error') return { kind: 'incomplete' };
  const code = error.code ?? '';
  if (error.type === 'card_error' || code === 'payment_intent_authentication_failure') {
    return { kind: 'declined', sentence: declineSentence(code, error.decline_code ?? null) };
  }
  return { kind: 'unknown' };
}

interface Props {
  readonly start: PaymentStart;
  /** Where a bank's own page sends the payer back to. */
  readonly returnPath: string;
  readonly busy: boolean;
  readonly onSend: () => void;
  readonly onOutcome: (outcome: Outcome) => void;
  readonly onCannotLoad: () => void;
}

/** The payment service's own form, in a frame of its origin: card numbers never reach this page. */
export default function CardForm(props: Props) {
  const { start, onCannotLoad } = props;
  const appearance = useAppearance();
  const [stripe, setStripe] = useState<Stripe | null>(null);
  useEffect(() => {
    let gone = false;
    loadPaymentScript(start).then(
      (loaded) => !gone && setStripe(loaded),
      () => !gone && onCannotLoad(),
    );
    return () => {
      gone = true;
    };
  }, [start, onCannotLoad]);
  const options = useMemo(
    () => ({ clientSecret: start.clientSecret, appearance, locale: 'en' as const }),
    [start.clientSecret, appearance],
  );
  if (!stripe) return <FetchingForm />;
  return (
    <Elements stripe={stripe} options={options}>
      <Inner {...props} />
    </Elements>
  );
}

function Inner({ start, returnPath, busy, onSend, onOutcome, onCannotLoad }: Props) {
  const stripe = useStripe();
  const elements = useElements();
  const [ready, setReady] = useState(false);

  async function pay(event: FormEvent) {
    event.preventDefault();
    if (!stripe || !elements || busy) return;
    onSend();
    try {
      const { error } = await stripe.confirmPayment({
        elements,
        confirmParams: { return_url: new URL(returnPath, window.location.origin).href },
        redirect: 'if_required',
      });
      onOutcome(error ? outcomeOf(error) : { kind: 'sent' });
    } catch {
      onOutcome({ kind: 'unknown' });
    }
  }

  return (
    <form onSubmit={(event) => void pay(event)} aria-busy={busy} className="grid gap-5">
      <PaymentElement onReady={() => setReady(true)} onLoadError={onCannotLoad} />
      <div>
        <Button type="submit" disabled={!ready || busy}>
          {busy ? 'Asking the bank' : `Pay ${formatCents(start.draw.amountCents)}`}
        </Button>
      </div>
      <p role="status" className="text-note text-quiet">
        {busy
          ? 'Please keep this page open. If your bank has a question, it appears here.'
          : 'The card number goes to the payment service alone. It is never seen or kept here.'}
      </p>
    </form>
  );
}
