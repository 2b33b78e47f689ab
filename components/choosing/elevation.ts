import { along, outward, wallLength } from '@/lib/engine/plan';
import type { Massing, MassingFront, MassingSolid, MassingSweep, Wall } from '@/lib/engine/types';

/** A rectangle on a wall's drawing, 1/64 inch: x from the wall's left end, y from the floor up. */
export interface Face {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
  /** How far it stands in front of the wall's line. */
  readonly out: number;
}

export interface ElevationFront extends Face {
  readonly front: MassingFront;
}
export interface ElevationSolid extends Face {
  readonly solid: MassingSolid;
}
export interface ElevationSweep {
  readonly sweep: MassingSweep;
  readonly x: number;
  readonly width: number;
  readonly y: number;
}

/** What is seen of one wall from the room; solids from the back to the front. */
export interface Elevation {
  readonly wall: Wall;
  readonly width: number;
  readonly height: number;
  readonly solids: readonly ElevationSolid[];
  readonly fronts: readonly ElevationFront[];
  readonly sweeps: readonly ElevationSweep[];
}

/** Directions that differ by less count as one; unit vectors. */
const PARALLEL = 0.98;
/** A thing belongs to the wall behind it when no farther out than this, in 1/64 inch: three feet. */
const REACH = 36 * 64;
const SLACK = 64;

interface Placed {
  readonly at: { readonly x: number; readonly y: number };
  readonly facing: { readonly x: number; readonly y: number };
}

/** Where a thing stands on a wall, or null when it faces elsewhere or stands before another one. */
function place(wall: Wall, thing: Placed): { x: number; out: number } | null {
  const o = outward(wall);
  if (thing.facing.x * o.x + thing.facing.y * o.y < PARALLEL) return null;
  return offset(wall, thing.at);
}

function offset(
  wall: Wall,
  point: { readonly x: number; readonly y: number },
): { x: number; out: number } | null {
  const a = along(wall);
  const o = outward(wall);
  const dx = point.x - wall.from.x;
  const dy = point.y - wall.from.y;
  const x = dx * a.x + dy * a.y;
  const out = dx * o.x + dy * o.y;
  if (out < -SLACK || out > REACH || x < -REACH || x > wallLength(wall) + SLACK) return null;
  return { x, out };
}

/** The drawing of every wall that something stands on, in plan order. Pure. */
export function elevations(massing: Massing): Elevation[] {
  const nearest = (thing: Placed): { wall: Wall; x: number; out: number } | null => {
    let best: { wall: Wall; x: number; out: number } | null = null;
    for (const wall of massing.walls) {
      const found = place(wall, thing);
      if (found && (!best || found.out < best.out)) best = { wall, ...found };
    }
    return best;
  };
  const solids = massing.solids.flatMap((solid) => {
    const found = nearest(solid);
    return found ? [{ solid, ...found, y: solid.at.z, width: solid.width, height: solid.height }] : [];
  });
  const fronts = massing.fronts.flatMap((front) => {
    const found = nearest(front);
    return found ? [{ front, ...found, y: front.at.z, width: front.width, height: front.height }] : [];
  });
  return massing.walls
    .map((wall) => ({
      wall,
      width: wallLength(wall),
      height: massing.ceiling,
      solids: solids.filter((one) => one.wall === wall).sort((a, b) => a.out - b.out),
      fronts: fronts.filter((one) => one.wall === wall),
      sweeps: sweepsOn(wall, massing.sweeps),
    }))
    .filter((one) => one.fronts.length > 0 || one.solids.length > 0);
}

/** The stretches of mouldings that run along a wall. */
function sweepsOn(wall: Wall, sweeps: readonly MassingSweep[]): ElevationSweep[] {
  const a = along(wall);
  return sweeps.flatMap((sweep) =>
    sweep.path.slice(1).flatMap((to, index) => {
      const from = sweep.path[index];
      if (!from) return [];
      const length = Math.hypot(to.x - from.x, to.y - from.y);
      if (length === 0) return [];
      const turn = ((to.x - from.x) * a.x + (to.y - from.y) * a.y) / length;
      const start = offset(wall, from);
      const end = offset(wall, to);
      if (Math.abs(turn) < PARALLEL || !start || !end) return [];
      const x = Math.min(start.x, end.x);
      return [{ sweep, x, width: Math.abs(end.x - start.x), y: sweep.z }];
    }),
  );
}
