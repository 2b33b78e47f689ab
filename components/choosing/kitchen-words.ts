import { chosenIn } from '@/lib/engine/choices';
import type { Edition } from '@/lib/engine/edition-types';
import type { Choices, Takeoff, Zone } from '@/lib/engine/types';
import { optionName, PLACE_NAMES, zonesOf } from './decisions';
import type { Survey } from '@/lib/engine/types';

const count = (n: number, one: string, many: string): string => `${n} ${n === 1 ? one : many}`;

/** A list in a sentence: `a, b and c`. */
const list = (items: readonly string[]): string =>
  items.length < 2 ? items.join('') : `${items.slice(0, -1).join(', ')} and ${items.at(-1)}`;

const lower = (text: string): string => text.charAt(0).toLowerCase() + text.slice(1);

/**
 * The picture in words, one sentence for each place that looks different, then the mouldings: `Wall cabinets: 18
 * doors, Recessed square in red oak, stain 3.`
 */
export function kitchenWords({
  survey,
  edition,
  choices,
  takeoff,
}: {
  survey: Survey;
  edition: Edition;
  choices: Choices;
  takeoff: Takeoff;
}): string[] {
  const looks = new Map<string, Zone[]>();
  for (const zone of zonesOf(survey)) {
    const { style, species, finish } = chosenIn(choices, zone);
    const look = `${optionName(edition, 'style', style)} in ${lower(optionName(edition, 'species', species))}, ${lower(optionName(edition, 'finish', finish))}`;
    looks.set(look, [...(looks.get(look) ?? []), zone]);
  }
  const sentences = [...looks].map(([look, zones]) => {
    const fronts = takeoff.fronts.filter((front) => zones.includes(front.zone));
    const doors = fronts.filter((front) => front.kind === 'door').length;
    const pieces = [
      doors > 0 && count(doors, 'door', 'doors'),
      fronts.length > doors && count(fronts.length - doors, 'drawer front', 'drawer fronts'),
    ].filter((piece) => piece !== false);
    const place = looks.size === 1 ? 'The kitchen' : capital(list(zones.map((zone) => PLACE_NAMES[zone])));
    return `${place}: ${list(pieces)}, ${look}.`;
  });
  const mouldings = (['crown', 'base', 'lightRail'] as const)
    .filter((key) => choices.kitchen[key] !== 'none')
    .map((key) => lower(optionName(edition, key, choices.kitchen[key])));
  return mouldings.length > 0 ? [...sentences, `With ${list(mouldings)}.`] : sentences;
}

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
