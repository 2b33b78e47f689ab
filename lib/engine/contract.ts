import type { Edition } from './edition-types';
import { cents } from './money';
import type { Cents, Takeoff } from './types';

/** Contract arithmetic as on a standard change-order form (M7; AIA G701). All sums with tax. */
export interface ContractArithmetic {
  readonly original: Cents;
  readonly netOfPrevious: Cents;
  readonly before: Cents;
  readonly thisOrder: Cents;
  readonly after: Cents;
  readonly days: number;
}

/** `previous` are the amounts of approved orders; declined and withdrawn ones leave no trace (M7). */
export function contractArithmetic(
  original: Cents,
  previous: readonly Cents[],
  thisOrder: Cents,
  days = 0,
): ContractArithmetic {
  const netOfPrevious = cents(previous.reduce<number>((sum, amount) => sum + amount, 0));
  const before = cents(original + netOfPrevious);
  return { original, netOfPrevious, before, thisOrder, after: cents(before + thisOrder), days };
}

type PartKind = Edition['restocking'][number]['part'];

interface OrderedPart {
  readonly kind: PartKind;
  readonly mark: string;
  /** Two parts of one mark are the same piece when these agree. */
  readonly made: string;
}

/** Everything that is ordered for a takeoff, by mark (A1). */
function orderedParts(takeoff: Takeoff): OrderedPart[] {
  return [
    ...takeoff.fronts.map((one) => ({
      kind: 'front' as const,
      mark: one.mark,
      made: [one.style, one.build, one.species, one.finish, one.width, one.height, one.glass].join(),
    })),
    ...takeoff.mouldings.map((one) => ({
      kind: 'moulding' as const,
      mark: one.mark,
      made: [one.profile, one.species, one.finish].join(),
    })),
    ...takeoff.boxes.map((one) => ({
      kind: 'box' as const,
      mark: one.mark,
      made: [one.material, one.width, one.height, one.length].join(),
    })),
    ...takeoff.panels.map((one) => ({
      kind: 'panel' as const,
      mark: one.mark,
      made: [one.kind, one.species, one.finish, one.width, one.height].join(),
    })),
  ];
}

export interface PartDifferences {
  /** Ordered parts that are no longer wanted as they are: to stop. */
  readonly removed: readonly { readonly kind: PartKind; readonly mark: string }[];
  /** To add. */
  readonly added: readonly { readonly kind: PartKind; readonly mark: string }[];
}

/** What an order changes for the bench: parts to stop and parts to add, by mark (A1, M6). */
export function partDifferences(before: Takeoff, after: Takeoff): PartDifferences {
  const old = new Map(orderedParts(before).map((part) => [`${part.kind} ${part.mark}`, part]));
  const now = new Map(orderedParts(after).map((part) => [`${part.kind} ${part.mark}`, part]));
  const missing = (from: typeof old, than: typeof old) =>
    [...from]
      .filter(([key, part]) => than.get(key)?.made !== part.made)
      .map(([, { kind, mark }]) => ({ kind, mark }));
  return { removed: missing(old, now), added: missing(now, old) };
}

export interface SunkCharge {
  readonly part: PartKind;
  readonly marks: readonly string[];
  readonly unitPrice: Cents;
  readonly amount: Cents;
}

export interface ChangePrice {
  readonly charges: readonly SunkCharge[];
  readonly restocking: Cents;
  /** New total − signed total + restocking (M6). */
  readonly amount: Cents;
}

/**
 * Price of a change (M6): new total − signed total, and after the release to the shop the edition's restocking charge
 * for each ordered part that is removed, shown as its own line.
 */
export function changePrice(
  signed: Takeoff,
  wanted: Takeoff,
  edition: Edition,
  isReleased: boolean,
): ChangePrice {
  const charges: SunkCharge[] = [];
  if (isReleased) {
    const { removed } = partDifferences(signed, wanted);
    for (const { part, price } of edition.restocking) {
      const marks = removed.filter((one) => one.kind === part).map((one) => one.mark);
      if (marks.length > 0 && price !== 0)
        charges.push({ part, marks, unitPrice: price, amount: cents(marks.length * price) });
    }
  }
  const restocking = cents(charges.reduce((sum, charge) => sum + charge.amount, 0));
  return { charges, restocking, amount: cents(wanted.total - signed.total + restocking) };
}
