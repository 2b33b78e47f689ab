import type { Edition, Terms } from './edition-types';
import { sixtyfourths } from './length';
import { fitNotes } from './notes';
import { hundredths } from './openings';
import { lineDrafts, sumOf } from './price';
import { quantities, quantitiesAfresh, type Quantities } from './quantities';
import { scheduleOf } from './schedule';
import {
  ZONES,
  type Cents,
  type Choices,
  type FillerStrip,
  type Front,
  type HardwareCount,
  type MouldingPiece,
  type PanelPiece,
  type Survey,
  type Takeoff,
} from './types';
import { adhesiveGallons, veneerStrips } from './veneer';
import { wordedLine } from './words';

/** What a takeoff is computed from. */
export interface EngineInput {
  readonly survey: Survey;
  readonly edition: Edition;
  readonly choices: Choices;
  readonly terms: Terms;
}

/**
 * Everything that a kitchen needs with a set of choices: parts, quantities, fit notes, price and schedule. Lengths in
 * 64ths, money in cents. Pure. Throws `EngineError` for an option or a wall that is not there.
 */
export function takeoff(survey: Survey, edition: Edition, choices: Choices, terms: Terms): Takeoff {
  const q = quantities(survey, edition, choices);
  const drafts = lineDrafts(q, survey, edition);
  const { subtotal, discount, tax, total } = sumOf(drafts, terms);
  const panels: PanelPiece[] = q.panels.map((panel) => {
    const { species, finish } = q.made[panel.zone];
    return { ...panel, species: species.id, finish: finish.id };
  });
  const bondedArea = bondedHundredths(q);
  return {
    fronts: frontsOf(q),
    fillers: fillersOf(q),
    veneer: veneerStrips(q.faces, q.measures, q.made, edition),
    mouldings: mouldingsOf(q),
    panels,
    boxes: q.boxes.boxes,
    counters: q.counters.map(({ mark, zone, length, depth, edge, splash, cutOuts }) => ({
      mark,
      zone,
      length,
      depth,
      edge,
      splash,
      cutOuts,
    })),
    hardware: hardwareOf(q, edition),
    bonded: { area: bondedArea, gallons: adhesiveGallons(bondedArea, edition.shop.adhesiveCoverage) },
    notes: fitNotes({ survey, edition, choices, terms }, q, total),
    lines: drafts.map((draft) => wordedLine(draft, q, edition)),
    subtotal,
    discount,
    tax,
    total,
    schedule: scheduleOf(q, drafts, edition, terms),
  };
}

/** The total alone, in cents; the same rules without words and lists. */
export function totalOf({ survey, edition, choices, terms }: EngineInput): Cents {
  return sumOf(lineDrafts(quantities(survey, edition, choices), survey, edition), terms).total;
}

/** The total with nothing remembered from earlier computations (M5). */
export function totalAfresh({ survey, edition, choices, terms }: EngineInput): Cents {
  return sumOf(lineDrafts(quantitiesAfresh(survey, edition, choices), survey, edition), terms).total;
}

function frontsOf(q: Quantities): Front[] {
  const fronts: Front[] = [];
  for (const { face, openings } of q.measures) {
    const { id, zone } = face.cabinet;
    const { style, species, finish } = q.made[zone];
    for (const opening of openings)
      for (const front of opening.fronts)
        fronts.push({
          mark: front.mark,
          opening: front.opening,
          cabinet: id,
          zone,
          kind: front.kind,
          style: style.id,
          build: front.build,
          species: species.id,
          finish: finish.id,
          width: front.width,
          height: front.height,
          hinge: front.hinge,
          hinges: front.hinges,
          glass: front.glass,
          area: front.area,
          billedArea: hundredths(front.area),
          weight: front.weight,
          shortenedBy: front.shortenedBy,
        });
  }
  return fronts;
}

function fillersOf(q: Quantities): FillerStrip[] {
  const strips: FillerStrip[] = [];
  for (const { face, openings, valance } of q.measures) {
    const { cabinet } = face;
    const leg = face.leg === 'B' ? 'B' : '';
    for (const { mark, placed, crownFiller, baseFiller } of openings) {
      const width = sixtyfourths(Math.floor(placed.width / 4) * 4);
      const shared = { opening: mark, zone: cabinet.zone, width };
      if (crownFiller > 0)
        strips.push({ ...shared, mark: `${mark}${leg}-F`, height: crownFiller, reason: 'crown' });
      if (baseFiller > 0)
        strips.push({ ...shared, mark: `${mark}${leg}-FB`, height: baseFiller, reason: 'base' });
    }
    if (valance > 0)
      strips.push({
        mark: `${cabinet.id}-V`,
        opening: cabinet.id,
        zone: cabinet.zone,
        width: sixtyfourths(Math.floor(face.width / 4) * 4),
        height: sixtyfourths(valance),
        reason: 'valance',
      });
  }
  return strips;
}

function mouldingsOf(q: Quantities): MouldingPiece[] {
  return (['crown', 'base', 'lightRail'] as const).flatMap((kind) =>
    q.mouldings[kind].pieces.map((piece) => {
      const { species, finish } = q.made[piece.zone];
      return { ...piece, species: species.id, finish: finish.id };
    }),
  );
}

/** Face covered by veneer, and panels glued the same way, in hundredths of a square foot (V3). */
function bondedHundredths(q: Quantities): number {
  let area = 0;
  for (const zone of ZONES) area += q.sums[zone].covered;
  for (const panel of q.panels)
    if (q.made[panel.zone].ends.bonded || panel.kind === 'toe') area += panel.width * panel.height;
  return hundredths(area * 25);
}

function hardwareOf(q: Quantities, edition: Edition): HardwareCount[] {
  const counts: HardwareCount[] = [];
  for (const zone of ZONES) {
    const made = q.made[zone];
    const fronts = q.measures
      .filter((one) => one.face.cabinet.zone === zone)
      .flatMap((one) => one.openings.flatMap((opening) => opening.fronts));
    const add = (item: string, name: string, count: number, parts: readonly string[]) => {
      if (count > 0) counts.push({ item, name, zone, count, parts });
    };
    const hung = fronts.filter((front) => front.hinges > front.joint);
    add(
      made.hingeSet.id,
      made.hingeSet.name,
      q.sums[zone].hinges,
      hung.map((front) => front.mark),
    );
    const joined = fronts.filter((front) => front.joint > 0);
    if (made.hingeSet.fold)
      add(
        `${made.hingeSet.id}-joint`,
        made.hingeSet.fold.name,
        q.sums[zone].joints,
        joined.map((front) => front.mark),
      );
    if (made.pull.form !== 'none')
      add(
        made.pull.id,
        made.pull.name,
        q.sums[zone].pulls,
        fronts.filter((front) => front.kind !== 'falseFront').map((front) => front.mark),
      );
    const bumpers = fronts.filter((front) => front.kind === 'door' || front.kind === 'drawerFront');
    add(
      'bumper',
      'Bumpers',
      bumpers.length * 2,
      bumpers.map((front) => front.mark),
    );
    for (const slide of edition.slides) {
      const boxes = q.boxes.boxes.filter((box) => box.zone === zone && box.slide === slide.id);
      add(
        slide.id,
        slide.name,
        boxes.length,
        boxes.map((box) => box.mark),
      );
    }
  }
  return counts;
}
