import { measureBoxes, type BoxesMeasure } from './boxes';
import { counterPlaces, type CounterPlace } from './counters';
import type { Edition } from './edition-types';
import { facesOf, type Face } from './faces';
import { madeByZone, type MadeByZone } from './made';
import { measureMoulding, mouldingKey, type MouldingKind, type MouldingMeasure } from './mouldings';
import { measureFace, type FaceMeasure } from './openings';
import { panelMeasures, type PanelMeasure } from './panels';
import { ZONES, type Choices, type Survey, type Zone } from './types';

/** Everything counted and measured in one kitchen with one set of choices, before prices and words. */
export interface Quantities {
  readonly faces: readonly Face[];
  readonly made: MadeByZone;
  /** By the index of the face; of faces that stay as they are, without fronts. */
  readonly measures: readonly FaceMeasure[];
  readonly sums: Readonly<Record<Zone, ZoneSum>>;
  readonly mouldings: Readonly<Record<MouldingKind, MouldingMeasure>>;
  readonly panels: readonly PanelMeasure[];
  readonly boxes: BoxesMeasure;
  readonly counters: readonly CounterPlace[];
}

export interface ZoneSum {
  readonly fiveArea: number;
  readonly slabArea: number;
  readonly fronts: number;
  readonly hinges: number;
  readonly joints: number;
  readonly pulls: number;
  readonly glass: number;
  readonly fillerStrips: number;
  readonly covered: number;
  readonly blocked: number;
}

/** What is remembered of one survey with one edition: each entry is what the same rules give again. */
interface Memory {
  readonly faces: readonly Face[];
  readonly measures: Map<string, FaceMeasure[]>;
  readonly sums: Map<string, ZoneSum>;
  readonly mouldings: Map<string, MouldingMeasure>;
  readonly panels: Map<string, PanelMeasure[]>;
  readonly counters: Map<string, CounterPlace[]>;
}

const memories = new WeakMap<Survey, WeakMap<Edition, Memory>>();
const MOST_KEPT = 400;

/**
 * Surveys and editions are never changed in place, so what depends on them can be remembered beside them. Every part
 * is computed by the same function as without memory, under a key of all that it depends on (M11).
 */
function memoryOf(survey: Survey, edition: Edition): Memory {
  let byEdition = memories.get(survey);
  if (!byEdition) memories.set(survey, (byEdition = new WeakMap()));
  let memory = byEdition.get(edition);
  if (!memory) {
    memory = emptyMemory(survey);
    byEdition.set(edition, memory);
  }
  return memory;
}

const emptyMemory = (survey: Survey): Memory => ({
  faces: facesOf(survey),
  measures: new Map(),
  sums: new Map(),
  mouldings: new Map(),
  panels: new Map(),
  counters: new Map(),
});

function kept<T>(memory: Map<string, T>, key: string, compute: () => T): T {
  const found = memory.get(key);
  if (found !== undefined) return found;
  if (memory.size >= MOST_KEPT) memory.clear();
  const made = compute();
  memory.set(key, made);
  return made;
}

/** What a zone's fronts, fillers and hinges depend on; the zone too, which has its own faces. */
const frontKey = (made: MadeByZone, zone: Zone): string => {
  const { style, species, overlay, crown, base, lightRail } = made[zone];
  return `${zone} ${style.id} ${species.id} ${overlay.id} ${crown?.id ?? ''} ${base?.id ?? ''} ${lightRail?.id ?? ''}`;
};

/** Throws `EngineError` for an option that the edition does not have. */
export function quantities(survey: Survey, edition: Edition, choices: Choices): Quantities {
  return measured(memoryOf(survey, edition), survey, edition, choices);
}

/** The same without anything remembered: the full recomputation of M5. */
export function quantitiesAfresh(survey: Survey, edition: Edition, choices: Choices): Quantities {
  return measured(emptyMemory(survey), survey, edition, choices);
}

function measured(memory: Memory, survey: Survey, edition: Edition, choices: Choices): Quantities {
  const made = madeByZone(edition, choices);
  const { faces } = memory;
  const byZone = new Map<Zone, FaceMeasure[]>();
  const sums: Record<Zone, ZoneSum> = { wall: NOTHING, base: NOTHING, island: NOTHING, tall: NOTHING };
  for (const zone of ZONES) {
    const key = frontKey(made, zone);
    const here = kept(memory.measures, key, () =>
      faces
        .filter((face) => face.cabinet.zone === zone)
        .map((face) => (face.renewed ? measureFace(face, made[zone], edition) : asItIs(face))),
    );
    byZone.set(zone, here);
    sums[zone] = kept(memory.sums, key, () => here.reduce(addUp, NOTHING));
  }
  const measures: FaceMeasure[] = [];
  for (const here of byZone.values()) for (const measure of here) measures[measure.face.index] = measure;

  const moulding = (kind: MouldingKind) => {
    // Nailers depend on the crown alone, so the measures of one overlay serve for all.
    const key = `${kind} ${mouldingKey(made, kind)}`;
    return kept(memory.mouldings, key, () =>
      measureMoulding(faces, measures, survey.walls, made, edition, kind),
    );
  };
  const panelKey = ZONES.map((zone) => `${made[zone].ends.id} ${made[zone].base === null}`).join();
  const counterKey = ZONES.map((zone) => made[zone].counter.id).join();
  return {
    faces,
    made,
    measures,
    sums,
    mouldings: { crown: moulding('crown'), base: moulding('base'), lightRail: moulding('lightRail') },
    panels: kept(memory.panels, panelKey, () => panelMeasures(faces, survey.walls, made, edition)),
    boxes: measureBoxes(measures, made, edition, choices),
    counters: kept(memory.counters, counterKey, () => counterPlaces(survey, faces, made)),
  };
}

const NOTHING: ZoneSum = {
  fiveArea: 0,
  slabArea: 0,
  fronts: 0,
  hinges: 0,
  joints: 0,
  pulls: 0,
  glass: 0,
  fillerStrips: 0,
  covered: 0,
  blocked: 0,
};

const asItIs = (face: Face): FaceMeasure => ({ face, openings: [], crown: null, valance: 0, ...NOTHING });

const addUp = (sum: ZoneSum, one: FaceMeasure): ZoneSum => ({
  fiveArea: sum.fiveArea + one.fiveArea,
  slabArea: sum.slabArea + one.slabArea,
  fronts: sum.fronts + one.fronts,
  hinges: sum.hinges + one.hinges,
  joints: sum.joints + one.joints,
  pulls: sum.pulls + one.pulls,
  glass: sum.glass + one.glass,
  fillerStrips: sum.fillerStrips + one.fillerStrips,
  covered: sum.covered + one.covered,
  blocked: sum.blocked + one.blocked,
});
