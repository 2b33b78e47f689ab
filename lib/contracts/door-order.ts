import type { OfferFront } from './offer';

/** The shop's door order, as the newest sealed page has it. */
export interface DoorOrder {
  readonly company: string;
  readonly job: { readonly number: number; readonly name: string; readonly address: string };
  readonly page: number;
  readonly seal: string;
  readonly sealedOn: string;
  readonly rows: readonly OfferFront[];
  /** Against the page before, by mark; null on the first page. */
  readonly since: {
    readonly page: number;
    readonly added: readonly string[];
    readonly removed: readonly string[];
    readonly changed: readonly string[];
  } | null;
}
