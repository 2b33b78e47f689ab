import { applyChange } from '@/lib/engine/choices';
import {
  CHOICE_KEYS,
  ZONES,
  type ChoiceChange,
  type ChoiceKey,
  type Choices,
  type ZoneOrKitchen,
} from '@/lib/engine/types';

/** What a person may alter of a scheme. */
export interface Draft {
  readonly choices: Choices;
  /** Decisions somebody has taken. */
  readonly decided: readonly string[];
  /** Decisions left to the salesperson. */
  readonly unsure: readonly string[];
}

/** What becomes of one decision. */
export interface DecisionMark {
  readonly key: string;
  readonly as: 'decided' | 'unsure' | 'open';
}

/** One act of choosing: what it changes, and which decisions are then taken, left to the salesperson or open. */
export interface Edit {
  readonly id: string;
  /** What was done, for the history and for a conflict: `Finish: Oak, stain 3`. */
  readonly label: string;
  readonly changes: readonly ChoiceChange[];
  readonly marks: readonly DecisionMark[];
}

export const applyChanges = (choices: Choices, changes: readonly ChoiceChange[]): Choices =>
  changes.reduce(applyChange, choices);

const withMark = (list: readonly string[], key: string, held: boolean): readonly string[] =>
  list.includes(key) === held ? list : held ? [...list, key] : list.filter((one) => one !== key);

/** A draft after one edit, whatever the draft holds by now. */
export function applyEdit(draft: Draft, edit: Edit): Draft {
  return edit.marks.reduce<Draft>(
    (now, mark) => ({
      ...now,
      decided: withMark(now.decided, mark.key, mark.as === 'decided'),
      unsure: withMark(now.unsure, mark.key, mark.as === 'unsure'),
    }),
    { ...draft, choices: applyChanges(draft.choices, edit.changes) },
  );
}

const stateOf = (draft: Draft, key: string): DecisionMark['as'] =>
  draft.decided.includes(key) ? 'decided' : draft.unsure.includes(key) ? 'unsure' : 'open';

/** The marks that lead from one draft's lists to the other's. */
export function marksBetween(from: Draft, to: Draft): DecisionMark[] {
  const keys = new Set([...from.decided, ...from.unsure, ...to.decided, ...to.unsure]);
  return [...keys]
    .filter((key) => stateOf(from, key) !== stateOf(to, key))
    .map((key) => ({ key, as: stateOf(to, key) }));
}

/** What one place says for a key, its own answer or none. */
const own = (choices: Choices, key: ChoiceKey, zone: ZoneOrKitchen): string | undefined =>
  zone === 'kitchen' ? choices.kitchen[key] : choices.zones[zone]?.[key];

/** The shortest list of changes that leads from one set of choices to the other. */
export function changesBetween(from: Choices, to: Choices): ChoiceChange[] {
  const changes: ChoiceChange[] = [];
  for (const key of CHOICE_KEYS) {
    // A zone goes back to the kitchen's answer only by choosing that answer or by a change of the whole kitchen.
    const kitchenMoves = from.kitchen[key] !== to.kitchen[key];
    if (kitchenMoves) changes.push({ key, zone: 'kitchen', option: to.kitchen[key] });
    for (const zone of ZONES) {
      const before = kitchenMoves ? undefined : own(from, key, zone);
      const after = own(to, key, zone);
      if (before !== after) changes.push({ key, zone, option: after ?? to.kitchen[key] });
    }
  }
  for (const mark of new Set([...Object.keys(from.inside), ...Object.keys(to.inside)])) {
    const after = to.inside[mark];
    if (from.inside[mark] !== after) changes.push({ inside: mark, option: after ?? null });
  }
  return changes;
}

/** Which answers a list of changes touches; two lists that share one are about the same thing. */
export const touched = (changes: readonly ChoiceChange[]): Set<string> =>
  new Set(changes.map((change) => ('inside' in change ? `inside ${change.inside}` : change.key)));

export const overlap = (a: readonly ChoiceChange[], b: readonly ChoiceChange[]): boolean => {
  const mine = touched(a);
  return [...touched(b)].some((one) => mine.has(one));
};
