import type { Cents } from './types';

/** Integer cents. Throws `RangeError` when it is not a whole number. */
export function cents(value: number): Cents {
  if (!Number.isSafeInteger(value)) throw new RangeError(`${value} is not a whole number of cents.`);
  return (value === 0 ? 0 : value) as Cents;
}

/** `numerator / denominator` of cents, half away from zero (M1). Both whole numbers, denominator positive. */
export function divideCents(numerator: number, denominator: number): Cents {
  const size = Math.abs(numerator);
  const quotient = Math.floor(size / denominator);
  const rounded = (size - quotient * denominator) * 2 >= denominator ? quotient + 1 : quotient;
  return cents(numerator < 0 ? -rounded : rounded);
}

/** Quantity in steps × price per unit of `steps` steps, rounded once, half away from zero (M1). */
export const lineAmount = (quantity: number, steps: number, unitPrice: Cents): Cents =>
  divideCents(quantity * unitPrice, steps);

/**
 * Splits `total` by `weights` with largest remainders, ties to the earliest; a negative total mirrors (M4).
 * The shares add up to the total exactly. Throws `RangeError` without a positive weight.
 */
export function share(total: Cents, weights: readonly number[]): Cents[] {
  const sum = weights.reduce((a, b) => a + b, 0);
  if (sum <= 0) throw new RangeError('Shares need a positive weight.');
  const size = Math.abs(total);
  const exact = weights.map((weight) => BigInt(size) * BigInt(weight));
  const floors = exact.map((value) => Number(value / BigInt(sum)));
  const remainders = exact.map((value) => Number(value % BigInt(sum)));
  const left = size - floors.reduce((a, b) => a + b, 0);
  const order = remainders.map((_, index) => index);
  order.sort((a, b) => (remainders[b] ?? 0) - (remainders[a] ?? 0) || a - b);
  for (const index of order.slice(0, left)) floors[index] = (floors[index] ?? 0) + 1;
  return floors.map((value) => cents(total < 0 ? -value : value));
}

/** `$1,234.50`, `−$3.00`. */
export function formatCents(value: Cents | number): string {
  const size = Math.abs(value);
  const whole = Math.floor(size / 100)
    .toString()
    .replace(/\B(?=(\d{3})+(?!\d))/g, ',');
  const text = `$${whole}.${String(size % 100).padStart(2, '0')}`;
  return value < 0 ? `−${text}` : text;
}
