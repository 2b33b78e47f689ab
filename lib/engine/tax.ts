import type { Terms } from './edition-types';
import { cents, divideCents, share } from './money';
import type { Cents, LineClass } from './types';

/** A line as tax sees it: its net amount, and into how many equal units it divides (1 for a measured line). */
export interface TaxedLine {
  readonly class: LineClass;
  readonly net: Cents;
  readonly units: number;
}

const MILLION = 1_000_000;

/** Parts per million of a class: its rates are added up first (M3). */
const rateOf = (terms: Terms, of: LineClass): number =>
  (terms.tax.rates[of] ?? []).reduce<number>((sum, rate) => sum + rate, 0);

/**
 * Tax in cents (M3): half up on the third decimal of the dollar, after the rates of a class are added up. On invoice
 * basis once over all lines; on item basis each line by itself, a counted line unit by unit. None where the contractor
 * pays tax on materials, or with an exemption on file (M9).
 */
export function taxOn(lines: readonly TaxedLine[], terms: Terms): Cents {
  const { mode, basis, exemption } = terms.tax;
  if (mode !== 'onLines' || exemption !== undefined) return cents(0);
  if (basis === 'invoice') {
    const exact = lines.reduce((sum, line) => sum + line.net * rateOf(terms, line.class), 0);
    return divideCents(exact, MILLION);
  }
  let total = 0;
  for (const line of lines) {
    const rate = rateOf(terms, line.class);
    if (rate === 0 || line.net === 0) continue;
    if (line.units <= 1) {
      total += divideCents(line.net * rate, MILLION);
      continue;
    }
    // All units but those with a cent more are taxed alike.
    const low = Math.trunc(line.net / line.units);
    const more = Math.abs(line.net - low * line.units);
    const high = low + Math.sign(line.net);
    total +=
      more * divideCents(high * rate, MILLION) + (line.units - more) * divideCents(low * rate, MILLION);
  }
  return cents(total);
}

/** The discount in cents, never more than the subtotal. */
export function discountOn(subtotal: Cents, discount: Terms['discount']): Cents {
  const wanted =
    discount.kind === 'none'
      ? 0
      : discount.kind === 'amount'
        ? discount.cents
        : divideCents(subtotal * discount.ppm, MILLION);
  return cents(Math.min(wanted, Math.max(0, subtotal)));
}

/** Net amounts of lines after a discount is spread over them by largest remainder, before tax (M1, M4). */
export function netAmounts(amounts: readonly Cents[], discount: Cents): Cents[] {
  if (discount === 0) return [...amounts];
  const weights = amounts.map((amount) => Math.max(0, amount));
  const shares = share(discount, weights);
  return amounts.map((amount, index) => cents(amount - (shares[index] ?? 0)));
}
