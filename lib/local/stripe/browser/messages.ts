/** What the page's script and the frames of the fake's origin say to each other. */

/** A refusal as the service words it; also what the card form finds before anything is sent. */
export interface BrowserError {
  readonly type: string;
  readonly code?: string;
  readonly decline_code?: string;
  readonly message?: string;
  readonly payment_intent?: unknown;
}

export interface BrowserIntent {
  readonly id: string;
  readonly status: string;
  readonly client_secret: string;
  readonly last_payment_error: BrowserError | null;
  readonly [field: string]: unknown;
}

export type Answer =
  { readonly error: BrowserError } | { readonly paymentIntent: BrowserIntent } | Record<string, never>;

export interface Keys {
  readonly publishableKey: string;
  /** The connected account that owns the payment. */
  readonly account: string;
}

/** The colours and measures that a page gives the form. */
export interface Appearance {
  readonly variables?: Readonly<Record<string, string>>;
  readonly rules?: Readonly<Record<string, Readonly<Record<string, string>>>>;
}

export type ToFrame =
  | { readonly kind: 'init'; readonly keys: Keys; readonly appearance: Appearance }
  | { readonly kind: 'appearance'; readonly appearance: Appearance }
  | { readonly kind: 'focus' | 'clear' }
  | { readonly kind: 'call'; readonly id: string; readonly name: 'submit' }
  | {
      readonly kind: 'call';
      readonly id: string;
      readonly name: 'confirm' | 'retrieve' | 'challenge';
      readonly clientSecret: string;
    };

export type FromFrame =
  | { readonly kind: 'loaded' }
  | { readonly kind: 'height'; readonly height: number }
  | { readonly kind: 'change'; readonly complete: boolean; readonly empty: boolean }
  | { readonly kind: 'focus' | 'blur' }
  | { readonly kind: 'answer'; readonly id: string; readonly answer: Answer };
