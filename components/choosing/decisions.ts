import { chosen, optionsOf } from '@/lib/engine/choices';
import type { Edition } from '@/lib/engine/edition-types';
import {
  ZONES,
  type ChoiceChange,
  type ChoiceKey,
  type Choices,
  type Survey,
  type Zone,
  type ZoneOrKitchen,
} from '@/lib/engine/types';

/** The parts of the drawn wall that lead to a decision. */
export type Part =
  'doors' | 'crown' | 'lightRail' | 'base' | 'pulls' | 'ends' | 'drawers' | 'inside' | 'counter';

export type DecisionKey = ChoiceKey | 'inside';

export interface Decision {
  readonly key: DecisionKey;
  readonly part: Part;
  /** As a title: `Finish`, to which the place is added. */
  readonly title: string;
  /** Inside a sentence: `the finish`. */
  readonly noun: string;
}

/** Everything there is to decide, in the order in which a kitchen is best decided. */
const ALL: readonly Decision[] = [
  { key: 'style', part: 'doors', title: 'Door style', noun: 'the door style' },
  { key: 'species', part: 'doors', title: 'Wood', noun: 'the wood' },
  { key: 'finish', part: 'doors', title: 'Finish', noun: 'the finish' },
  { key: 'overlay', part: 'doors', title: 'Overlay', noun: 'the overlay' },
  { key: 'crown', part: 'crown', title: 'Crown', noun: 'the crown' },
  { key: 'lightRail', part: 'lightRail', title: 'Light rail', noun: 'the light rail' },
  { key: 'base', part: 'base', title: 'Base moulding', noun: 'the base moulding' },
  { key: 'pull', part: 'pulls', title: 'Pulls', noun: 'the pulls' },
  { key: 'ends', part: 'ends', title: 'Exposed ends', noun: 'the exposed ends' },
  { key: 'drawerBox', part: 'drawers', title: 'Drawer boxes', noun: 'the drawer boxes' },
  { key: 'counter', part: 'counter', title: 'Counter', noun: 'the counter' },
];

const INSIDE: Decision = {
  key: 'inside',
  part: 'inside',
  title: 'Storage inside',
  noun: 'the storage inside',
};

/** What this contractor leaves to decide: a key with one option only is no decision. */
export function decisionsOf(edition: Edition): readonly Decision[] {
  const open = ALL.filter((one) => one.key !== 'inside' && optionsOf(edition, one.key).length > 1);
  return edition.storage.some((one) => one.kind !== 'none') ? [...open, INSIDE] : open;
}

/** The zones that this kitchen has, in walking order. */
export const zonesOf = (survey: Survey): readonly Zone[] =>
  ZONES.filter((zone) => survey.cabinets.some((cabinet) => cabinet.zone === zone));

/** Where a decision may differ in this kitchen; only the whole kitchen when it may not. */
export function scopesOf(edition: Edition, survey: Survey, key: DecisionKey): readonly ZoneOrKitchen[] {
  if (key === 'inside' || !edition.zonedKeys.includes(key)) return ['kitchen'];
  const zones = zonesOf(survey).filter((zone) => key !== 'crown' || zone === 'wall' || zone === 'tall');
  return zones.length > 1 ? ['kitchen', ...zones] : ['kitchen'];
}

/** `of the whole kitchen`, for titles; a peninsula is called what the survey calls it. */
export const PLACE_NAMES: Readonly<Record<ZoneOrKitchen, string>> = {
  kitchen: 'whole kitchen',
  wall: 'wall cabinets',
  base: 'base cabinets',
  island: 'island',
  tall: 'tall cabinets',
};

/** The zones that have an answer of their own to a key. */
export const ownAnswers = (choices: Choices, key: ChoiceKey): readonly Zone[] =>
  ZONES.filter((zone) => choices.zones[zone]?.[key] !== undefined);

export const optionName = (edition: Edition, key: ChoiceKey, id: string): string =>
  optionsOf(edition, key).find((option) => option.id === id)?.name ?? id;

/** What stands now for a decision, in words: `Oak, stain 3`, with the zones that differ. */
export function answerWords(edition: Edition, choices: Choices, key: DecisionKey): string {
  if (key === 'inside') {
    const count = Object.keys(choices.inside).length;
    return count === 0 ? 'Nothing added' : count === 1 ? 'In one opening' : `In ${count} openings`;
  }
  const others = ownAnswers(choices, key).map(
    (zone) => `${PLACE_NAMES[zone]}: ${optionName(edition, key, chosen(choices, key, zone))}`,
  );
  return [optionName(edition, key, choices.kitchen[key]), ...others].join('; ');
}

/** One change in words: `Finish, wall cabinets: Paint 2, chalk`. */
export function changeWords(edition: Edition, change: ChoiceChange): string {
  if ('inside' in change) {
    const storage = edition.storage.find((one) => one.id === change.option);
    return `Inside ${change.inside}: ${storage?.name ?? 'nothing added'}`;
  }
  const title = ALL.find((one) => one.key === change.key)?.title ?? change.key;
  const place = change.zone === 'kitchen' ? '' : `, ${PLACE_NAMES[change.zone]}`;
  return `${title}${place}: ${optionName(edition, change.key, change.option)}`;
}

/** What an option brings with it, named once each: `with Hard maple, clear`. */
export function swapWords(edition: Edition, swaps: readonly ChoiceChange[]): string {
  const names = swaps.flatMap((swap) => ('key' in swap ? [optionName(edition, swap.key, swap.option)] : []));
  return names.length === 0 ? '' : `with ${[...new Set(names)].join(', ')}`;
}
