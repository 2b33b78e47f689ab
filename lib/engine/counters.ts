import { endOf, type Face } from './faces';
import { sixtyfourths } from './length';
import type { MadeByZone } from './made';
import type { Appliance, CounterPiece, Survey, Wall, Zone } from './types';

/** A counter piece in place: `from` and `to` along its wall, overhangs included; `out` its front, `back` its back. */
export interface CounterPlace extends CounterPiece {
  readonly wall: Wall;
  readonly from: number;
  readonly to: number;
  readonly back: number;
  readonly out: number;
  readonly z: number;
}

interface Span {
  readonly from: number;
  readonly to: number;
  readonly depth: number;
  readonly top: number;
  readonly zone: Zone | null;
  readonly cabinet: string | null;
  readonly leftExposed: boolean;
  readonly rightExposed: boolean;
  readonly backExposed: boolean;
}

/** What a counter lies on: base cabinets that stay or are renewed, and the dishwashers between them. */
function spansOn(faces: readonly Face[], appliances: readonly Appliance[], wall: Wall): Span[] {
  const spans: Span[] = [];
  for (const face of faces) {
    const { cabinet } = face;
    if (face.wall !== wall || cabinet.tier !== 'base') continue;
    // The first leg carries the corner itself.
    const reach = face.leg === 'A' ? cabinet.depth : 0;
    spans.push({
      from: face.at - (face.left.kind === 'innerCorner' ? reach : 0),
      to: endOf(face) + (face.right.kind === 'innerCorner' ? reach : 0),
      depth: cabinet.depth,
      top: cabinet.bottom + cabinet.height,
      zone: cabinet.zone,
      cabinet: cabinet.id,
      leftExposed: face.left.kind === 'exposed',
      rightExposed: face.right.kind === 'exposed',
      backExposed: cabinet.backExposed === true && wall.kind === 'freestanding',
    });
  }
  for (const one of appliances) {
    if (one.wall !== wall.id || one.kind !== 'dishwasher') continue;
    spans.push({
      from: one.at,
      to: one.at + one.width,
      depth: one.depth,
      top: one.bottom + one.height,
      zone: null,
      cabinet: null,
      leftExposed: false,
      rightExposed: false,
      backExposed: false,
    });
  }
  return spans.sort((a, b) => a.from - b.from);
}

/** The counter over every run of base cabinets, with its overhang (M10). */
export function counterPlaces(survey: Survey, faces: readonly Face[], made: MadeByZone): CounterPlace[] {
  const pieces: CounterPlace[] = [];
  for (const wall of survey.walls) {
    const groups: Span[][] = [];
    for (const span of spansOn(faces, survey.appliances, wall)) {
      const group = groups[groups.length - 1];
      const last = group?.[group.length - 1];
      if (group && last && span.from - last.to <= 96) group.push(span);
      else groups.push([span]);
    }
    groups.forEach((group, index) => {
      const first = group[0];
      const last = group[group.length - 1];
      const zones = group.flatMap((span) => (span.zone === null ? [] : [span.zone]));
      // A peninsula's counter is its own, though it begins on a corner cabinet of the base run.
      const zone = zones.includes('island') ? 'island' : zones[0];
      if (!first || !last || !zone) return;
      const { counter } = made[zone];
      const over = counter.overhang;
      const isFree = wall.kind === 'freestanding';
      const backExposed = group.some((span) => span.backExposed);
      // A leg that comes out of a corner begins at the edge of the counter it meets.
      const beginsInCorner = faces.some(
        (face) =>
          face.leg === 'B' &&
          face.wall === wall &&
          face.cabinet.id === first.cabinet &&
          face.left.kind === 'innerCorner',
      );
      const endsInCorner = faces.some(
        (face) =>
          face.leg === 'B' &&
          face.wall === wall &&
          face.cabinet.id === last.cabinet &&
          face.right.kind === 'innerCorner',
      );
      const from = first.from + (beginsInCorner ? over : first.leftExposed ? -over : 0);
      const to = last.to + (endsInCorner ? -over : last.rightExposed ? over : 0);
      const deepest = Math.max(...group.map((span) => span.depth));
      const back = backExposed ? -over : 0;
      const out = deepest + over;
      const ids = new Set(group.flatMap((span) => (span.cabinet === null ? [] : [span.cabinet])));
      const cutOuts = survey.appliances.filter(
        (one) =>
          (one.kind === 'sink' || one.kind === 'cooktop') && one.within !== undefined && ids.has(one.within),
      ).length;
      const ends = (first.leftExposed ? 1 : 0) + (last.rightExposed ? 1 : 0);
      const tops = group.filter((span) => span.cabinet !== null).map((span) => span.top);
      pieces.push({
        mark: `${wall.id}-C${index + 1}`,
        zone,
        wall,
        from,
        to,
        back,
        out,
        z: Math.max(...tops),
        length: sixtyfourths(to - from),
        depth: sixtyfourths(out - back),
        edge: sixtyfourths((to - from) * (backExposed ? 2 : 1) + ends * (out - back)),
        splash: sixtyfourths(isFree ? 0 : to - from),
        cutOuts,
      });
    });
  }
  return pieces;
}
