import type { Stripe } from '@stripe/stripe-js';
import { loadStripe } from '@stripe/stripe-js/pure';

const loads = new Map<string, Promise<Stripe | null>>();

function inject(address: string): Promise<void> {
  return new Promise((resolve, reject) => {
    const script = document.createElement('script');
    script.src = address;
    script.async = true;
    script.onload = () => resolve();
    script.onerror = () => {
      script.remove();
      reject(new Error(`${address} could not be loaded.`));
    };
    document.head.append(script);
  });
}

/**
 * Loads the payment service's script once for a company's account. The library takes a `window.Stripe` that is
 * there already, so a script of another address goes in first. A failed load may be tried again.
 */
export function loadPaymentScript(settings: {
  readonly publishableKey: string;
  readonly scriptUrl: string | null;
  readonly account: string;
}): Promise<Stripe | null> {
  const { publishableKey, scriptUrl, account } = settings;
  const name = `${publishableKey} ${account}`;
  const known = loads.get(name);
  if (known) return known;
  const load = (async () => {
    if (scriptUrl && !window.Stripe) await inject(scriptUrl);
    return loadStripe(publishableKey, { stripeAccount: account });
  })();
  loads.set(name, load);
  load.catch(() => loads.delete(name));
  return load;
}
