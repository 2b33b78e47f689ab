import { sixtyfourths } from './length';
import type { Cabinet, PlanPoint, Survey, Wall } from './types';

export interface Vector {
  readonly x: number;
  readonly y: number;
}

/** Unit vector from a wall's left end to its right, as seen from its front. */
export function along(wall: Wall): Vector {
  const dx = wall.to.x - wall.from.x;
  const dy = wall.to.y - wall.from.y;
  const length = Math.hypot(dx, dy);
  return length === 0 ? { x: 1, y: 0 } : { x: dx / length, y: dy / length };
}

/** Unit vector from the wall into the room: to the right of `along`. */
export function outward(wall: Wall): Vector {
  const { x, y } = along(wall);
  return { x: y, y: x === 0 ? 0 : -x };
}

export const wallLength = (wall: Wall): number =>
  Math.round(Math.hypot(wall.to.x - wall.from.x, wall.to.y - wall.from.y));

/** The plan point `at` along a wall and `out` in front of it. */
export function pointOn(wall: Wall, at: number, out: number): PlanPoint {
  const a = along(wall);
  const o = outward(wall);
  return {
    x: sixtyfourths(Math.round(wall.from.x + a.x * at + o.x * out)),
    y: sixtyfourths(Math.round(wall.from.y + a.y * at + o.y * out)),
  };
}

export function wallOf(survey: Survey, id: string): Wall | undefined {
  return survey.walls.find((wall) => wall.id === id);
}

/** A cabinet whose face is renewed. */
export const isRenewed = (cabinet: Cabinet): boolean =>
  cabinet.action === 'reface' || cabinet.action === 'replace' || cabinet.action === 'add';

export const top = (cabinet: Cabinet): number => cabinet.bottom + cabinet.height;
export const end = (cabinet: Cabinet): number => cabinet.at + cabinet.width;

/** Neighbouring renewed cabinets on one wall whose tops (or bottoms) and depths agree (C2). */
export interface Run {
  readonly wall: Wall;
  readonly cabinets: readonly Cabinet[];
  readonly at: number;
  readonly end: number;
  readonly depth: number;
}

const TOLERANCE = 4;

/** Runs of the cabinets that `belongs`, in the order of walls and places; `level` must agree within 1/16 in. */
export function runs(
  survey: Survey,
  belongs: (cabinet: Cabinet) => boolean,
  level: (cabinet: Cabinet) => number,
): Run[] {
  const found: Run[] = [];
  for (const wall of survey.walls) {
    const here = survey.cabinets
      .filter((cabinet) => cabinet.wall === wall.id && isRenewed(cabinet) && belongs(cabinet))
      .sort((a, b) => a.at - b.at);
    let group: Cabinet[] = [];
    const close = () => {
      const first = group[0];
      const last = group[group.length - 1];
      if (first && last)
        found.push({ wall, cabinets: group, at: first.at, end: end(last), depth: first.depth });
      group = [];
    };
    for (const cabinet of here) {
      const last = group[group.length - 1];
      const joins =
        last !== undefined &&
        Math.abs(level(last) - level(cabinet)) <= TOLERANCE &&
        last.depth === cabinet.depth &&
        bridged(survey, wall, end(last), cabinet.at, cabinet.tier);
      if (!joins) close();
      group.push(cabinet);
    }
    close();
  }
  return found;
}

/** Whether the stretch between two places is nothing, or covered by a filler. */
function bridged(survey: Survey, wall: Wall, from: number, to: number, tier: Cabinet['tier']): boolean {
  if (to - from <= TOLERANCE) return true;
  return survey.fillers.some(
    (filler) =>
      filler.wall === wall.id &&
      filler.tier === tier &&
      filler.at <= from + TOLERANCE &&
      filler.at + filler.width >= to - TOLERANCE,
  );
}

export type RunEnd = 'exposed' | 'inside' | 'stopped';

/** How a run ends: seen from the side, into the run of the next wall, or against something. */
export function runEnd(all: readonly Run[], run: Run, side: 'left' | 'right'): RunEnd {
  const cabinet = side === 'left' ? run.cabinets[0] : run.cabinets[run.cabinets.length - 1];
  if (neighbour(all, run, side)) return 'inside';
  return cabinet?.[side].exposed ? 'exposed' : 'stopped';
}

/** The run round the inside corner at one end of a run, when their fronts meet. */
export function neighbour(all: readonly Run[], run: Run, side: 'left' | 'right'): Run | undefined {
  const front = side === 'left' ? run.at : run.end;
  const here = pointOn(run.wall, front, run.depth);
  return all.find((other) => {
    if (other.wall.id === run.wall.id) return false;
    const corner = cornerOf(run, other);
    if (!corner) return false;
    const theirs = pointOn(other.wall, side === 'left' ? other.end : other.at, other.depth);
    const near = (point: PlanPoint) =>
      Math.hypot(point.x - corner.x, point.y - corner.y) <= run.depth + other.depth;
    return near(here) && near(theirs);
  });
}

/** Where the front lines of two runs cross; undefined when they are parallel. */
export function cornerOf(a: Run, b: Run): PlanPoint | undefined {
  const pa = pointOn(a.wall, 0, a.depth);
  const pb = pointOn(b.wall, 0, b.depth);
  const da = along(a.wall);
  const db = along(b.wall);
  const cross = da.x * db.y - da.y * db.x;
  if (Math.abs(cross) < 1e-6) return undefined;
  const t = ((pb.x - pa.x) * db.y - (pb.y - pa.y) * db.x) / cross;
  return { x: sixtyfourths(Math.round(pa.x + da.x * t)), y: sixtyfourths(Math.round(pa.y + da.y * t)) };
}
