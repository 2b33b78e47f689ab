import type { EditionCosts, Terms } from './edition-types';
import { cents, divideCents } from './money';
import { discountOn } from './tax';
import type { Cents, PriceLine, Takeoff } from './types';

const MILLION = 1_000_000;

export interface MarginLine {
  readonly code: string;
  readonly amount: Cents;
  readonly cost: Cents;
}

/** What a job costs and leaves, for staff with the right to see it (M8). */
export interface Margin {
  readonly lines: readonly MarginLine[];
  readonly cost: Cents;
  /** Total without tax, less cost. */
  readonly margin: Cents;
  /** Parts per million of the total without tax; 0 for a total of 0. */
  readonly share: number;
}

/** By option, then by what the line is for, then by its class, then the default. */
function costShare(line: PriceLine, costs: EditionCosts): number {
  const item = line.code.slice(0, line.code.lastIndexOf('.'));
  for (const key of [line.option, item, line.class, 'default']) {
    const found = key !== undefined && Object.hasOwn(costs.costShare, key) ? costs.costShare[key] : undefined;
    if (found !== undefined) return found;
  }
  return MILLION;
}

/** Cost and margin of a takeoff by the edition's cost shares (M8). A line without a share counts as all cost. */
export function marginOf(takeoff: Takeoff, costs: EditionCosts): Margin {
  const lines = takeoff.lines.map((line) => ({
    code: line.code,
    amount: line.amount,
    cost: divideCents(line.amount * costShare(line, costs), MILLION),
  }));
  const cost = cents(lines.reduce((sum, line) => sum + line.cost, 0));
  const net = takeoff.subtotal - takeoff.discount;
  const margin = cents(net - cost);
  return { lines, cost, margin, share: net === 0 ? 0 : Math.round((margin * MILLION) / net) };
}

/**
 * Whether a discount stays within what a role may give; `limit` in parts per million of the subtotal, a share that is
 * exactly the limit being allowed.
 */
export function discountWithin(subtotal: Cents, discount: Terms['discount'], limit: number): boolean {
  return discountOn(subtotal, discount) * MILLION <= subtotal * limit;
}
