import type { Edition, Finish, MouldingProfile, Species } from './edition-types';
import type {
  Availability,
  ChoiceChange,
  ChoiceKey,
  Choices,
  Zone,
  ZoneChoices,
  ZoneOrKitchen,
} from './types';

/** The option a zone has: its own, or the kitchen's. */
export function chosen(choices: Choices, key: ChoiceKey, zone: ZoneOrKitchen): string {
  return (zone === 'kitchen' ? undefined : choices.zones[zone]?.[key]) ?? choices.kitchen[key];
}

export function chosenIn(choices: Choices, zone: Zone): ZoneChoices {
  return { ...choices.kitchen, ...choices.zones[zone] };
}

/**
 * Choices after one change. A change for the whole kitchen takes the zones' own answers to that key away; a zone's
 * answer that equals the kitchen's is not kept. Pure.
 */
export function applyChange(choices: Choices, change: ChoiceChange): Choices {
  if ('inside' in change) {
    const { [change.inside]: _gone, ...rest } = choices.inside;
    return {
      ...choices,
      inside: change.option === null ? rest : { ...rest, [change.inside]: change.option },
    };
  }
  const without = (zone: Zone): Partial<ZoneChoices> => {
    const { [change.key]: _gone, ...rest } = choices.zones[zone] ?? {};
    return rest;
  };
  if (change.zone === 'kitchen') {
    const zones: Partial<Record<Zone, Partial<ZoneChoices>>> = {};
    for (const zone of Object.keys(choices.zones) as Zone[]) {
      const rest = without(zone);
      if (Object.keys(rest).length > 0) zones[zone] = rest;
    }
    return { ...choices, kitchen: { ...choices.kitchen, [change.key]: change.option }, zones };
  }
  const rest = without(change.zone);
  const own = change.option === choices.kitchen[change.key] ? rest : { ...rest, [change.key]: change.option };
  const { [change.zone]: _zone, ...others } = choices.zones;
  return {
    ...choices,
    zones: Object.keys(own).length > 0 ? { ...others, [change.zone]: own } : others,
  };
}

interface Named {
  readonly id: string;
  readonly name: string;
}

/** The options of a key, in the edition's order. */
export function optionsOf(edition: Edition, key: ChoiceKey): readonly Named[] {
  switch (key) {
    case 'style':
      return edition.styles;
    case 'species':
      return edition.species;
    case 'finish':
      return edition.finishes;
    case 'overlay':
      return edition.overlays;
    case 'pull':
      return edition.pulls;
    case 'crown':
      return [NONE, ...edition.crowns];
    case 'base':
      return [NONE, ...edition.bases];
    case 'lightRail':
      return [NONE, ...edition.lightRails];
    case 'ends':
      return edition.ends;
    case 'drawerBox':
      return edition.drawerBoxes;
    case 'counter':
      return edition.counters;
  }
}

export const NONE: Named = { id: 'none', name: 'None' };

export function find<T extends { readonly id: string }>(list: readonly T[], id: string): T | undefined {
  return list.find((one) => one.id === id);
}

const MOULDING_KEYS = { crown: 'crowns', base: 'bases', lightRail: 'lightRails' } as const;

/** Why two chosen things do not go together, with the key that would give way; `null` when all does (X1). */
export function clash(edition: Edition, zoneChoices: ZoneChoices): { key: ChoiceKey; reason: string } | null {
  const style = find(edition.styles, zoneChoices.style);
  const species = find(edition.species, zoneChoices.species);
  const finish = find(edition.finishes, zoneChoices.finish);
  if (style?.species && species && !style.species.includes(species.id))
    return { key: 'species', reason: `${style.name} is not made in ${species.name.toLowerCase()}.` };
  if (species && finish && !finishSuits(species, finish))
    return { key: 'finish', reason: `${finish.name} does not go on ${species.name.toLowerCase()}.` };
  if (style?.overlays && !style.overlays.includes(zoneChoices.overlay)) {
    const overlay = find(edition.overlays, zoneChoices.overlay);
    return {
      key: 'overlay',
      reason: `${style.name} does not hang with ${overlay?.name.toLowerCase() ?? 'it'}.`,
    };
  }
  for (const key of ['crown', 'base', 'lightRail'] as const) {
    const profiles: readonly MouldingProfile[] = edition[MOULDING_KEYS[key]];
    const profile = find(profiles, zoneChoices[key]);
    if (profile?.finishes && finish && !profile.finishes.includes(finish.family))
      return { key, reason: `${profile.name} is not made with ${finish.name.toLowerCase()}.` };
  }
  return null;
}

/** A finish's family must suit the species, and a stain must have its colour on it. */
export function finishSuits(species: Species, finish: Finish): boolean {
  if (!species.finishes.includes(finish.family)) return false;
  return finish.colours === undefined || finish.colours[species.id] !== undefined;
}

export interface Reach {
  readonly availability: Availability;
  readonly choices: Choices;
  readonly swaps: readonly ChoiceChange[];
  readonly reason?: string;
}

/**
 * Choices after a change and the swaps it needs (X1). The picked key never gives way; each clash is answered by the
 * first option in the edition's order that removes it. `notAvailable` when none does.
 */
export function reach(
  edition: Edition,
  choices: Choices,
  change: ChoiceChange,
  zones: readonly Zone[],
): Reach {
  let now = applyChange(choices, change);
  if ('inside' in change) return { availability: 'available', choices: now, swaps: [] };
  const swaps: ChoiceChange[] = [];
  const touched = change.zone === 'kitchen' ? zones : [change.zone];
  const reasons: string[] = [];
  for (const zone of touched) {
    for (let step = 0; step < 6; step++) {
      const found = clash(edition, chosenIn(now, zone));
      if (!found) break;
      // The picked key stands; the other side of the clash gives way.
      const key: ChoiceKey = found.key === change.key ? otherSide(found.key) : found.key;
      const answer = optionsOf(edition, key).find((option) => {
        const tried = { ...chosenIn(now, zone), [key]: option.id };
        const left = clash(edition, tried);
        return left === null || (left.key !== found.key && left.key !== change.key);
      });
      if (!answer || step === 5)
        return { availability: 'notAvailable', choices, swaps: [], reason: found.reason };
      const swap: ChoiceChange = { key, zone: change.zone, option: answer.id };
      if (!reasons.includes(found.reason)) reasons.push(found.reason);
      swaps.push(swap);
      now = applyChange(now, swap);
    }
  }
  if (swaps.length === 0) return { availability: 'available', choices: now, swaps };
  return { availability: 'availableWithSwap', choices: now, swaps, reason: reasons.join(' ') };
}

/** What gives way when the picked key itself is the one a clash names. */
function otherSide(key: ChoiceKey): ChoiceKey {
  switch (key) {
    case 'species':
      return 'style';
    case 'finish':
      return 'species';
    case 'overlay':
      return 'style';
    default:
      return 'finish';
  }
}
