import { cornerSide, LEVEL, type Face } from './faces';
import { pointOn, top, wallLength } from './plan';
import type { Cabinet, FrameLayout, PlanPoint, Survey, Wall } from './types';

/** A sum that does not close, with what it comes to and what it should (S1). Lengths in 64ths. */
export interface OpenSum {
  readonly cabinet: string;
  readonly leg: Face['leg'];
  readonly along: 'row' | 'column';
  /** Numbers of the openings in it. */
  readonly openings: readonly number[];
  readonly sum: number;
  readonly should: number;
}

interface Size {
  readonly width: number;
  readonly height: number;
}

function sizeOf(layout: FrameLayout): Size {
  if ('opening' in layout) return layout.opening;
  const sizes = layout.parts.map(sizeOf);
  const members = layout.members.reduce<number>((a, b) => a + b, 0);
  const first = sizes[0] ?? { width: 0, height: 0 };
  return layout.split === 'row'
    ? { width: sizes.reduce((sum, one) => sum + one.width, members), height: first.height }
    : { width: first.width, height: sizes.reduce((sum, one) => sum + one.height, members) };
}

const numbersIn = (layout: FrameLayout): number[] =>
  'opening' in layout ? [layout.opening.n] : layout.parts.flatMap(numbersIn);

/** Every row and column of a frame that is off by more than 1/16 in, before any filler (S1). */
export function openSums(face: Face): OpenSum[] {
  const { frame, cabinet } = face;
  const found: OpenSum[] = [];
  const judge = (along: OpenSum['along'], layout: FrameLayout, sum: number, should: number) => {
    if (Math.abs(sum - should) > LEVEL)
      found.push({ cabinet: cabinet.id, leg: face.leg, along, openings: numbersIn(layout), sum, should });
  };
  // Sums are told with the frame's own members, as they are read off the tape.
  const stiles = frame.stileLeft + frame.stileRight;
  const rails = frame.railTop + frame.railBottom;
  const walk = (layout: FrameLayout, width: number, height: number, w: number, h: number): void => {
    const size = sizeOf(layout);
    if ('opening' in layout) {
      judge('row', layout, size.width + w, width + w);
      judge('column', layout, size.height + h, height + h);
      return;
    }
    if (layout.split === 'row') {
      judge('row', layout, size.width + w, width + w);
      for (const part of layout.parts) walk(part, sizeOf(part).width, height, 0, h);
    } else {
      judge('column', layout, size.height + h, height + h);
      for (const part of layout.parts) walk(part, width, sizeOf(part).height, w, 0);
    }
  };
  walk(frame.layout, face.width - stiles, cabinet.height - rails, stiles, rails);
  return found;
}

/** Something that takes a stretch of a wall between two heights. */
interface Stand {
  readonly id: string;
  readonly from: number;
  readonly to: number;
  readonly bottom: number;
  readonly top: number;
}

const tall = (cabinet: Cabinet): { bottom: number; top: number } => ({
  bottom: cabinet.bottom - (cabinet.toe?.height ?? 0),
  top: top(cabinet),
});

function standsOn(survey: Survey, wall: Wall, panel: number): Stand[] {
  const stands: Stand[] = [];
  for (const cabinet of survey.cabinets) {
    if (cabinet.action === 'remove') continue;
    const { corner } = cabinet;
    const left = cabinet.left.exposed ? panel : 0;
    const right = cabinet.right.exposed ? panel : 0;
    if (cabinet.wall === wall.id) {
      const width = corner ? corner.legA : cabinet.width;
      stands.push({
        id: cabinet.id,
        from: cabinet.at - left,
        to: cabinet.at + width + (corner ? 0 : right),
        ...tall(cabinet),
      });
    } else if (corner && corner.otherWall === wall.id) {
      const isRight = cornerSide(survey, cabinet) === 'right';
      const length = wallLength(wall);
      stands.push({
        id: cabinet.id,
        from: isRight ? 0 : length - corner.legB,
        to: isRight ? corner.legB : length,
        ...tall(cabinet),
      });
    }
  }
  for (const one of survey.appliances) {
    if (one.wall !== wall.id || one.within !== undefined || one.kind === 'hood') continue;
    stands.push({
      id: one.id,
      from: one.at,
      to: one.at + one.width,
      bottom: one.bottom,
      top: one.bottom + one.height,
    });
  }
  for (const filler of survey.fillers)
    if (filler.wall === wall.id)
      stands.push({
        id: filler.id,
        from: filler.at,
        to: filler.at + filler.width,
        bottom: filler.bottom,
        top: filler.bottom + filler.height,
      });
  return stands.sort((a, b) => a.from - b.from);
}

export type PlanFault =
  | {
      readonly kind: 'overlap';
      readonly ids: readonly [string, string];
      readonly by: number;
      readonly wall: string;
    }
  | { readonly kind: 'wall'; readonly ids: readonly [string]; readonly by: number; readonly wall: string }
  | { readonly kind: 'ceiling'; readonly ids: readonly [string]; readonly by: number; readonly wall: string }
  | { readonly kind: 'room'; readonly ids: readonly [string]; readonly by: number; readonly wall: string };

/** What does not fit along the walls, under the ceiling or in the room (S2). `panel` is an end panel's thickness. */
export function planFaults(survey: Survey, faces: readonly Face[], panel: number): PlanFault[] {
  const faults: PlanFault[] = [];
  for (const wall of survey.walls) {
    const stands = standsOn(survey, wall, panel);
    const length = wallLength(wall);
    stands.forEach((one, index) => {
      const by = Math.max(-one.from, one.to - length);
      if (by > LEVEL) faults.push({ kind: 'wall', ids: [one.id], by, wall: wall.id });
      for (const other of stands.slice(index + 1)) {
        if (other.from >= one.to - LEVEL) break;
        const inBand = other.bottom < one.top - LEVEL && one.bottom < other.top - LEVEL;
        const over = Math.min(one.to, other.to) - other.from;
        if (inBand && over > LEVEL && other.id !== one.id)
          faults.push({ kind: 'overlap', ids: [one.id, other.id], by: over, wall: wall.id });
      }
    });
  }
  for (const face of faces) {
    const { cabinet, wall } = face;
    const over = top(cabinet) - face.overhead;
    if (over > LEVEL && face.leg !== 'B')
      faults.push({ kind: 'ceiling', ids: [cabinet.id], by: over, wall: wall.id });
    const corners = [
      pointOn(wall, face.at, cabinet.depth),
      pointOn(wall, face.at + face.width, cabinet.depth),
      pointOn(wall, face.at, 0),
      pointOn(wall, face.at + face.width, 0),
    ];
    const out = Math.max(...corners.map((point) => outside(survey.room.outline, point)));
    if (out > LEVEL) faults.push({ kind: 'room', ids: [cabinet.id], by: Math.round(out), wall: wall.id });
  }
  return faults;
}

/** How far a point lies outside a polygon; 0 inside or on its edge. */
function outside(outline: readonly PlanPoint[], point: PlanPoint): number {
  let inside = false;
  let nearest = Infinity;
  outline.forEach((b, index) => {
    const a = outline[(index + outline.length - 1) % outline.length];
    if (!a) return;
    if (a.y > point.y !== b.y > point.y) {
      const x = a.x + ((point.y - a.y) * (b.x - a.x)) / (b.y - a.y);
      if (point.x < x) inside = !inside;
    }
    const dx = b.x - a.x;
    const dy = b.y - a.y;
    const square = dx * dx + dy * dy;
    const t = square === 0 ? 0 : ((point.x - a.x) * dx + (point.y - a.y) * dy) / square;
    const k = Math.min(1, Math.max(0, t));
    nearest = Math.min(nearest, Math.hypot(point.x - a.x - k * dx, point.y - a.y - k * dy));
  });
  return inside ? 0 : nearest;
}

/** What is left free along a wall on the floor and at the wall cabinets, in 64ths (S2). */
export function slackOn(survey: Survey, wall: Wall, panel: number, tier: 'base' | 'wall'): number {
  // A line at knee or at head height tells what stands in the way there.
  const height = tier === 'base' ? 12 * 64 : 78 * 64;
  let covered = 0;
  let reached = 0;
  for (const one of standsOn(survey, wall, panel)) {
    if (one.bottom > height || one.top <= height) continue;
    covered += Math.max(0, one.to - Math.max(one.from, reached));
    reached = Math.max(reached, one.to);
  }
  return wallLength(wall) - covered;
}
