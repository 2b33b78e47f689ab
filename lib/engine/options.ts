import { applyChange, chosen, optionsOf, reach } from './choices';
import type { Edition, Terms } from './edition-types';
import { quantities } from './quantities';
import { revealFaults, type RevealFault } from './reveals';
import { totalAfresh, totalOf, type EngineInput } from './takeoff';
import {
  ZONES,
  type Cents,
  type ChoiceChange,
  type ChoiceKey,
  type Choices,
  type OptionState,
  type Survey,
  type Zone,
  type ZoneOrKitchen,
} from './types';
import { cents } from './money';
import { inch } from './words';

/** Zones that a survey has; choices in others change nothing. */
export const zonesIn = (survey: Survey): readonly Zone[] =>
  ZONES.filter((zone) => survey.cabinets.some((cabinet) => cabinet.zone === zone));

/** What an overlay or a crown must not add to in this kitchen. */
interface Obstacles {
  readonly blocked: number;
  readonly reveals: readonly RevealFault[];
}

function obstacles(input: EngineInput, key: ChoiceKey): Obstacles | null {
  if (key !== 'overlay' && key !== 'crown') return null;
  const q = quantities(input.survey, input.edition, input.choices);
  return {
    blocked: ZONES.reduce((sum, zone) => sum + q.sums[zone].blocked, 0),
    reveals: key === 'overlay' ? revealFaults(q) : [],
  };
}

/** Why an overlay or a crown cannot be built in this kitchen, though it goes together with the rest. */
function hindrance(now: Obstacles | null, then: Obstacles | null): string | null {
  if (!now || !then) return null;
  if (then.reveals.length > now.reveals.length) {
    const largest = Math.min(...then.reveals.map((fault) => fault.largest));
    return `The frames are too narrow for it: the largest overlay that can be built here is ${inch(largest)}.`;
  }
  if (then.blocked > now.blocked) return 'Some fronts could then not be made or hung.';
  return null;
}

/**
 * Every option of a key as it stands now (M5, X1): its difference after the swaps it needs, or why it cannot be had.
 * `zone` is where it would change; `kitchen` changes all zones and takes their own answers away.
 */
export function options(input: EngineInput, key: ChoiceKey, zone: ZoneOrKitchen): OptionState[] {
  const { edition, choices } = input;
  const now = totalOf(input);
  const present = obstacles(input, key);
  const isChosen = (id: string): boolean =>
    zone === 'kitchen'
      ? choices.kitchen[key] === id && ZONES.every((one) => chosen(choices, key, one) === id)
      : chosen(choices, key, zone) === id;
  return optionsOf(edition, key).map(({ id, name }): OptionState => {
    const change: ChoiceChange = { key, zone, option: id };
    if (isChosen(id))
      return { id, name, chosen: true, availability: 'available', delta: cents(0), swaps: [] };
    const reached = reach(edition, choices, change, ZONES);
    if (reached.availability === 'notAvailable')
      return {
        id,
        name,
        chosen: false,
        availability: 'notAvailable',
        delta: null,
        swaps: [],
        ...(reached.reason ? { reason: reached.reason } : {}),
        ...(reached.nearest ? { nearest: reached.nearest } : {}),
      };
    const wanted = { ...input, choices: reached.choices };
    const reason = present && hindrance(present, obstacles(wanted, key));
    if (reason)
      return { id, name, chosen: false, availability: 'notAvailable', delta: null, swaps: [], reason };
    return {
      id,
      name,
      chosen: false,
      availability: reached.availability,
      delta: cents(totalOf(wanted) - now),
      swaps: reached.swaps,
      ...(reached.reason ? { reason: reached.reason } : {}),
    };
  });
}

/** The options of every key of a zone. */
export function optionsAll(input: EngineInput, zone: ZoneOrKitchen): Record<ChoiceKey, OptionState[]> {
  const of = (key: ChoiceKey) => options(input, key, zone);
  return {
    style: of('style'),
    species: of('species'),
    finish: of('finish'),
    overlay: of('overlay'),
    pull: of('pull'),
    crown: of('crown'),
    base: of('base'),
    lightRail: of('lightRail'),
    ends: of('ends'),
    drawerBox: of('drawerBox'),
    counter: of('counter'),
  };
}

/** What may be put inside an opening, the first being nothing (B3). */
export function insideOptions(input: EngineInput, mark: string): OptionState[] {
  const { survey, edition, choices } = input;
  const now = totalOf(input);
  const present = choices.inside[mark] ?? 'none';
  const all = [
    { id: 'none', name: 'Nothing added' },
    ...edition.storage.filter((option) => option.kind !== 'none'),
  ];
  return all.map(({ id, name }): OptionState => {
    const changed = applyChange(choices, { inside: mark, option: id === 'none' ? null : id });
    const { boxes } = quantities(survey, edition, changed);
    const fault = boxes.faults.find((one) => one.opening.mark === mark && one.code.startsWith('pullOut'));
    const shared = { id, name, chosen: id === present, swaps: [] };
    if (fault && id !== present)
      return {
        ...shared,
        availability: 'notAvailable',
        delta: null,
        reason:
          fault.code === 'pullOut.wrongOpening'
            ? 'It does not go into this kind of opening.'
            : 'Behind this frame and its hinges nothing of use is left for it.',
        nearest: { inside: mark, option: null },
      };
    const total = totalOf({ ...input, choices: changed });
    return { ...shared, availability: 'available', delta: cents(total - now) };
  });
}

/** The options of one decision: a key in a zone, or the inside of an opening. */
export function optionStates(
  survey: Survey,
  edition: Edition,
  choices: Choices,
  terms: Terms,
  at: { readonly key: ChoiceKey; readonly zone: ZoneOrKitchen } | { readonly inside: string },
): OptionState[] {
  const input = { survey, edition, choices, terms };
  return 'inside' in at ? insideOptions(input, at.inside) : options(input, at.key, at.zone);
}

/** Difference of a change with the swaps it needs, from a full recomputation (M5); `null` when it cannot be had. */
export function deltaAfresh(input: EngineInput, change: ChoiceChange): Cents | null {
  const reached = reach(input.edition, input.choices, change, ZONES);
  if (reached.availability === 'notAvailable') return null;
  return cents(totalAfresh({ ...input, choices: reached.choices }) - totalAfresh(input));
}
