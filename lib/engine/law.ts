import { businessDaysAfter } from './dates';
import { EngineError } from './error';
import { cents, share } from './money';
import { RULE_SETS, type CancellationRule, type CapPart, type CapRule, type RuleSet } from './rule-sets';
import type { CalendarDate, Cents } from './types';

/** The rule set of a state. Throws `EngineError` `unknownRuleSet`. */
export function ruleSetOf(id: string): RuleSet {
  const found = Object.hasOwn(RULE_SETS, id) ? RULE_SETS[id] : undefined;
  if (!found) throw new EngineError('unknownRuleSet', id);
  return found;
}

/** The calendar date at whose end, at midnight, the right to cancel ends (L1). `holidays` are statutory and observed days. */
export const cancellationDeadline = (
  signedOn: CalendarDate,
  rule: CancellationRule,
  holidays: ReadonlySet<CalendarDate>,
): CalendarDate => businessDaysAfter(signedOn, rule.businessDays, holidays, 'notSunday');

/** The last day on which what was paid comes back after a cancellation, counted the same way (L1). */
export const refundDeadline = (
  cancelledOn: CalendarDate,
  ruleSet: RuleSet,
  holidays: ReadonlySet<CalendarDate>,
): CalendarDate =>
  businessDaysAfter(cancelledOn, ruleSet.cancellation.refundBusinessDays, holidays, 'notSunday');

export interface Sale {
  readonly total: Cents;
  readonly place: 'home' | 'elsewhere' | 'sellersPlace';
  readonly buyerIsSenior?: boolean;
  readonly inDisaster?: boolean;
}

/** The right to cancel that a sale carries, the longest that applies; `null` when none does (L1). */
export function cancellationRule(ruleSet: RuleSet, sale: Sale): CancellationRule | null {
  const { leastAtHome, leastElsewhere, ordinary, senior, disaster } = ruleSet.cancellation;
  if (sale.place === 'sellersPlace') return null;
  if (sale.total < (sale.place === 'home' ? leastAtHome : leastElsewhere)) return null;
  const rules = [ordinary];
  if (sale.buyerIsSenior && senior) rules.push(senior);
  if (sale.inDisaster && disaster) rules.push(disaster);
  return rules.reduce((longest, rule) => (rule.businessDays > longest.businessDays ? rule : longest));
}

const capPart = (part: CapPart, total: Cents, specialOrder: Cents): number => {
  if (part.kind === 'fixed') return part.cents;
  return part.kind === 'specialOrder'
    ? specialOrder
    : Math.floor((total * part.numerator) / part.denominator);
};

/**
 * The most that a deposit may be, in cents (L2): rounded down, never above the contract sum; `null` without a cap.
 * `specialOrder` is the cost of parts that the edition marks so.
 */
export function depositCap(rule: CapRule | null, total: Cents, specialOrder: Cents): Cents | null {
  if (!rule || (rule.over !== undefined && total <= rule.over)) return null;
  const parts = rule.parts.map((part) => capPart(part, total, specialOrder));
  const cap =
    rule.take === 'least'
      ? Math.min(...parts)
      : rule.take === 'greatest'
        ? Math.max(...parts)
        : parts.reduce((sum, part) => sum + part, 0);
  return cents(Math.max(0, Math.min(cap, total)));
}

export interface DrawPlanLine {
  readonly label: string;
  /** Parts per million of the contract sum. */
  readonly share: number;
  readonly due: string;
}

export interface Draw {
  readonly label: string;
  readonly due: string;
  readonly amount: Cents;
}

const MILLION = 1_000_000;

/**
 * The payments of a contract (M4, L2): the first is the smaller of its share and the cap, both rounded down; the rest
 * is shared over the later ones by largest remainder. They add up to the total exactly.
 */
export function draws(
  total: Cents,
  plan: readonly DrawPlanLine[],
  ruleSet: RuleSet,
  specialOrder: Cents = cents(0),
): Draw[] {
  const [first, ...later] = plan;
  if (!first) return [];
  if (later.length === 0) return [{ label: first.label, due: first.due, amount: total }];
  const cap = depositCap(ruleSet.depositCap, total, specialOrder);
  const own = Math.floor((total * first.share) / MILLION);
  const deposit = cents(cap === null ? own : Math.min(own, cap));
  const rest = share(
    cents(total - deposit),
    later.map((line) => line.share),
  );
  return [
    { label: first.label, due: first.due, amount: deposit },
    ...later.map((line, index) => ({ label: line.label, due: line.due, amount: rest[index] ?? cents(0) })),
  ];
}

/**
 * The open payments after an order of so many cents (L3, M4): what is paid stays, the difference goes to the open
 * ones by their own size. `open` in order; the answer adds up to their sum and the order's amount.
 */
export function drawsAfterOrder(open: readonly Cents[], amount: Cents): Cents[] {
  if (open.length === 0) return [];
  const weights = open.map((one) => Math.max(0, one));
  const shares = share(amount, weights.some((one) => one > 0) ? weights : open.map(() => 1));
  return open.map((one, index) => cents(one + (shares[index] ?? 0)));
}
