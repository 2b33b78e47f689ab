import type { OfferBody } from '@/lib/contracts/offer';
import { chosen, doorOrder, find, optionsOf } from '@/lib/engine';
import type { Edition } from '@/lib/engine/edition-types';
import { formatLength } from '@/lib/engine/length';
import {
  CHOICE_KEYS,
  ZONES,
  type ChoiceKey,
  type Choices,
  type Sixtyfourths,
  type Survey,
  type Takeoff,
} from '@/lib/engine/types';

const KEY_NAMES: Readonly<Record<ChoiceKey, string>> = {
  style: 'Door style',
  species: 'Species',
  finish: 'Finish',
  overlay: 'Overlay',
  pull: 'Pulls',
  crown: 'Crown',
  base: 'Base moulding',
  lightRail: 'Light rail',
  ends: 'End panels',
  drawerBox: 'Drawer boxes',
  counter: 'Counter',
};

/** Choices with their names: one row where the whole kitchen agrees, else one for each zone. */
export function nameChoices(survey: Survey, edition: Edition, choices: Choices): OfferBody['choicesNamed'] {
  const zones = ZONES.filter((zone) => survey.cabinets.some((cabinet) => cabinet.zone === zone));
  const rows: OfferBody['choicesNamed'] = [];
  for (const key of CHOICE_KEYS) {
    const name = (id: string) => find(optionsOf(edition, key), id)?.name ?? id;
    const ids = zones.map((zone) => chosen(choices, key, zone));
    const [first] = ids;
    if (first === undefined) continue;
    if (ids.every((id) => id === first))
      rows.push({ zone: 'kitchen', label: KEY_NAMES[key], option: name(first) });
    else
      zones.forEach((zone, index) =>
        rows.push({ zone, label: KEY_NAMES[key], option: name(ids[index] ?? first) }),
      );
  }
  for (const [mark, id] of Object.entries(choices.inside).sort(([a], [b]) => (a < b ? -1 : 1)))
    rows.push({ zone: 'kitchen', label: `Inside ${mark}`, option: find(edition.storage, id)?.name ?? id });
  return rows;
}

/** Fronts in the order of their marks, with names for ids. */
export function nameFronts(takeoff: Takeoff, edition: Edition): OfferBody['fronts'] {
  const sizes = new Map(takeoff.fronts.map((front) => [front.mark, front]));
  return doorOrder(takeoff, edition).map((row) => {
    const front = sizes.get(row.mark);
    if (!front) throw new Error(`Front ${row.mark} has no size.`);
    return { ...row, width: front.width, height: front.height };
  });
}

const many = (count: number, one: string, more = `${one}s`) => `${count} ${count === 1 ? one : more}`;

/** How much of everything, in sentences. */
export function countParts(takeoff: Takeoff): string[] {
  const of = (kind: string) => takeoff.fronts.filter((front) => front.kind === kind).length;
  const run = (kind: string) =>
    takeoff.mouldings
      .filter((piece) => piece.kind === kind)
      .reduce((sum, piece) => sum + Math.max(piece.backLength, piece.frontLength), 0);
  const feet = (length: number) => formatLength(Math.ceil(length / 12) as Sixtyfourths);
  const hinges = takeoff.fronts.reduce((sum, front) => sum + front.hinges, 0);
  return [
    `${many(of('door'), 'door')}, ${many(of('drawerFront'), 'drawer front')}, ${many(of('falseFront'), 'false front')}.`,
    `${many(hinges, 'hinge')}.`,
    ...(takeoff.fillers.length > 0 ? [`${many(takeoff.fillers.length, 'filler strip')}.`] : []),
    ...(['crown', 'base', 'lightRail'] as const)
      .filter((kind) => run(kind) > 0)
      .map(
        (kind) =>
          `${kind === 'lightRail' ? 'Light rail' : kind === 'base' ? 'Base moulding' : 'Crown'}: ${feet(run(kind))} ft.`,
      ),
    ...(takeoff.panels.length > 0
      ? [`${many(takeoff.panels.length, 'panel')} on ends, backs and toe kicks.`]
      : []),
    ...(takeoff.boxes.length > 0
      ? [`${many(takeoff.boxes.length, 'drawer box or pull-out', 'drawer boxes and pull-outs')}.`]
      : []),
  ];
}
