import { chosen, find } from './choices';
import type {
  Counter,
  DoorStyle,
  DrawerBoxOption,
  Edition,
  EndTreatment,
  Finish,
  HingeSet,
  MouldingProfile,
  Overlay,
  Pull,
  Species,
} from './edition-types';
import { EngineError } from './error';
import { ZONES, type ChoiceKey, type Choices, type Zone } from './types';

/** What one zone is made of: its choices as the edition's own options. */
export interface Made {
  readonly zone: Zone;
  readonly style: DoorStyle;
  readonly species: Species;
  readonly finish: Finish;
  readonly overlay: Overlay;
  readonly hingeSet: HingeSet;
  readonly pull: Pull;
  readonly crown: MouldingProfile | null;
  readonly base: MouldingProfile | null;
  readonly lightRail: MouldingProfile | null;
  readonly ends: EndTreatment;
  readonly drawerBox: DrawerBoxOption;
  readonly counter: Counter;
}

export type MadeByZone = Readonly<Record<Zone, Made>>;

function pick<T extends { readonly id: string }>(list: readonly T[], id: string, key: ChoiceKey): T {
  const found = find(list, id);
  if (!found) throw new EngineError('unknownOption', `${key}: ${id}`);
  return found;
}

function made(edition: Edition, choices: Choices, zone: Zone): Made {
  const id = (key: ChoiceKey) => chosen(choices, key, zone);
  const moulding = (list: readonly MouldingProfile[], key: ChoiceKey) =>
    id(key) === 'none' ? null : pick(list, id(key), key);
  const overlay = pick(edition.overlays, id('overlay'), 'overlay');
  return {
    zone,
    style: pick(edition.styles, id('style'), 'style'),
    species: pick(edition.species, id('species'), 'species'),
    finish: pick(edition.finishes, id('finish'), 'finish'),
    overlay,
    hingeSet: pick(edition.hingeSets, overlay.hingeSet, 'overlay'),
    pull: pick(edition.pulls, id('pull'), 'pull'),
    crown: moulding(edition.crowns, 'crown'),
    base: moulding(edition.bases, 'base'),
    lightRail: moulding(edition.lightRails, 'lightRail'),
    ends: pick(edition.ends, id('ends'), 'ends'),
    drawerBox: pick(edition.drawerBoxes, id('drawerBox'), 'drawerBox'),
    counter: pick(edition.counters, id('counter'), 'counter'),
  };
}

/** The options of every zone. Throws `EngineError` `unknownOption`. */
export function madeByZone(edition: Edition, choices: Choices): MadeByZone {
  const [wall, base, island, tall] = ZONES.map((zone) => made(edition, choices, zone));
  if (!wall || !base || !island || !tall) throw new EngineError('unknownOption', 'zone');
  return { wall, base, island, tall };
}
