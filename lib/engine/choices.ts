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
  /** When not available: another option of the same key that needs no swap. */
  readonly nearest?: ChoiceChange;
}

/** More swaps than any chain of clashes needs: each zone could ask for one of each key. */
const MOST_SWAPS = 16;

/**
 * Choices after a change and the swaps it needs (X1). The picked key never gives way. Each clash is answered by the
 * first option in the edition's order that leaves none in that zone, else by the first that removes this one. A key
 * that may not differ by zone is swapped for the whole kitchen.
 */
export function reach(
  edition: Edition,
  choices: Choices,
  change: ChoiceChange,
  zones: readonly Zone[],
): Reach {
  const changed = applyChange(choices, change);
  if ('inside' in change) return { availability: 'available', choices: changed, swaps: [] };
  const settled = settle(edition, changed, change, zones);
  if (settled.fault !== null)
    return {
      availability: 'notAvailable',
      choices,
      swaps: [],
      reason: settled.fault,
      ...nearestTo(edition, choices, change, zones),
    };
  if (settled.swaps.length === 0) return { availability: 'available', choices: changed, swaps: [] };
  return {
    availability: 'availableWithSwap',
    choices: settled.choices,
    swaps: settled.swaps,
    reason: settled.reasons.join(' '),
  };
}

/** The changes that a change brings with it; `null` when it does not go together with the rest. */
export function swapsFor(
  edition: Edition,
  choices: Choices,
  change: ChoiceChange,
  zones: readonly Zone[],
): readonly ChoiceChange[] | null {
  const reached = reach(edition, choices, change, zones);
  return reached.availability === 'notAvailable' ? null : reached.swaps;
}

interface Settled {
  readonly choices: Choices;
  readonly swaps: readonly ChoiceChange[];
  readonly reasons: readonly string[];
  readonly fault: string | null;
}

function settle(
  edition: Edition,
  changed: Choices,
  change: { readonly key: ChoiceKey; readonly zone: ZoneOrKitchen },
  zones: readonly Zone[],
): Settled {
  let now = changed;
  const swaps: ChoiceChange[] = [];
  const reasons: string[] = [];
  for (let step = 0; step <= MOST_SWAPS; step++) {
    const zone = zones.find((one) => clash(edition, chosenIn(now, one)) !== null);
    if (zone === undefined) return { choices: now, swaps, reasons, fault: null };
    const here = chosenIn(now, zone);
    const found = clash(edition, here);
    if (!found) break;
    const key = found.key === change.key ? otherSide(found.key) : found.key;
    const left = (option: string) => clash(edition, { ...here, [key]: option });
    const all = optionsOf(edition, key);
    const answer =
      all.find((option) => left(option.id) === null) ??
      all.find((option) => {
        const rest = left(option.id);
        return rest !== null && rest.key !== found.key && rest.key !== key;
      });
    if (!answer || answer.id === here[key]) return { choices: now, swaps, reasons, fault: found.reason };
    const own = now.zones[zone]?.[key] !== undefined;
    const zoned = edition.zonedKeys.includes(key);
    const where: ZoneOrKitchen = zoned && (own || change.zone !== 'kitchen') ? zone : 'kitchen';
    const swap: ChoiceChange = { key, zone: where, option: answer.id };
    swaps.push(swap);
    if (!reasons.includes(found.reason)) reasons.push(found.reason);
    now = applyChange(now, swap);
  }
  return { choices: now, swaps, reasons, fault: reasons.join(' ') || 'These choices do not go together.' };
}

function nearestTo(
  edition: Edition,
  choices: Choices,
  change: { readonly key: ChoiceKey; readonly zone: ZoneOrKitchen; readonly option: string },
  zones: readonly Zone[],
): { nearest?: ChoiceChange } {
  const other = optionsOf(edition, change.key).find((option) => {
    if (option.id === change.option) return false;
    const tried = applyChange(choices, { ...change, option: option.id });
    return zones.every((zone) => clash(edition, chosenIn(tried, zone)) === null);
  });
  return other ? { nearest: { ...change, option: other.id } } : {};
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
