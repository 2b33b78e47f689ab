import { Vector3 } from 'three';
import type { Massing, Wall } from '@/lib/engine/types';
import { axesOf, inchesToMetres, metres, planToScene } from './space';

/** The eye's height above the floor, in inches. */
export const EYE_INCHES = 60;
/** Vertical field of view in degrees. */
export const FIELD_DEGREES = 38;

/** Where one looks from: always level, so that verticals stay vertical; the picture is shifted, not tilted. */
export interface Station {
  readonly target: Vector3;
  /** Direction from the target to the eye, level. */
  readonly back: Vector3;
  readonly distance: number;
  /** Height of the middle of what is shown. */
  readonly middle: number;
}

/** What has to fit: half the width and half the height, in metres, at a depth of 0 before the target. */
function distanceFor(halfWidth: number, halfHeight: number, aspect: number): number {
  const tangent = Math.tan((FIELD_DEGREES * Math.PI) / 360);
  return Math.max(halfHeight / tangent, halfWidth / (tangent * aspect));
}

function outwardOf(wall: Wall): Vector3 {
  const dx = wall.to.x - wall.from.x;
  const dy = wall.to.y - wall.from.y;
  const length = Math.hypot(dx, dy) || 1;
  return new Vector3(dy / length, 0, dx / length);
}

/** The station before one wall: as much of it as is built upon, floor to ceiling. */
export function wallStation(massing: Massing, wallId: string, aspect: number): Station | null {
  const wall = massing.walls.find((one) => one.id === wallId);
  if (!wall) return null;
  const out = outwardOf(wall);
  const along = new Vector3(-out.z, 0, out.x).negate();
  const origin = planToScene(wall.from, 0);
  const spots = [...massing.solids, ...massing.fronts].filter((solid) => {
    const facing = new Vector3(solid.facing.x, 0, -solid.facing.y);
    return facing.dot(out) > 0.9 && (solid.cabinet?.startsWith(`${wall.id}-`) ?? false);
  });
  const wide = spots.flatMap((solid) => {
    const place = planToScene(solid.at, 0).sub(origin).dot(along);
    return [place, place + metres(solid.width)];
  });
  const length = metres(Math.hypot(wall.to.x - wall.from.x, wall.to.y - wall.from.y));
  const from = Math.min(...(wide.length > 0 ? wide : [0]));
  const to = Math.max(...(wide.length > 0 ? wide : [length]));
  const depth = inchesToMetres(24);
  const middle = metres(massing.ceiling) / 2;
  const target = origin
    .clone()
    .addScaledVector(along, (from + to) / 2)
    .addScaledVector(out, depth);
  const margin = inchesToMetres(7);
  return {
    target,
    back: out,
    distance: distanceFor((to - from) / 2 + margin, middle + margin, aspect),
    middle,
  };
}

/** The plan corners of a solid. */
function planCorners(solid: Massing['solids'][number]): Vector3[] {
  const { right, out } = axesOf(solid.facing);
  const at = planToScene(solid.at, 0);
  const across = right.multiplyScalar(metres(solid.width));
  const back = out.multiplyScalar(-metres(solid.depth));
  return [at, at.clone().add(across), at.clone().add(back), at.clone().add(across).add(back)];
}

/**
 * The station from which the whole room is seen: outside of the wall that hides least. Walls are seen only from
 * inside, so that the room lies open.
 */
export function roomStation(massing: Massing, aspect: number): Station {
  // What is built, not the empty rest of the room, fills the picture.
  const built = massing.solids.filter((solid) => solid.cabinet !== null);
  const points =
    built.length > 0 ? built.flatMap(planCorners) : massing.outline.map((point) => planToScene(point, 0));
  const xs = points.map((point) => point.x);
  const zs = points.map((point) => point.z);
  const [west, east] = [Math.min(...xs), Math.max(...xs)];
  const [near, far] = [Math.max(...zs), Math.min(...zs)];
  const target = new Vector3((west + east) / 2, 0, (near + far) / 2);
  const directions = [
    new Vector3(0, 0, 1),
    new Vector3(0, 0, -1),
    new Vector3(1, 0, 0),
    new Vector3(-1, 0, 0),
  ];
  const hidden = (back: Vector3) =>
    massing.fronts.filter((front) => new Vector3(front.facing.x, 0, -front.facing.y).dot(back) < -0.5).length;
  const best = directions.reduce((a, b) => (hidden(b) < hidden(a) ? b : a));
  // A step to the side shows the returning walls at different angles.
  const back = best.clone().applyAxisAngle(new Vector3(0, 1, 0), 0.2);
  const sideways = Math.abs(best.x) > 0.5;
  const width = sideways ? near - far : east - west;
  const depth = sideways ? east - west : near - far;
  const middle = metres(massing.ceiling) / 2;
  const margin = inchesToMetres(4);
  // The far wall fills the picture; the near end may run out of it.
  const distance = distanceFor(width / 2 + margin, middle + margin, aspect) + depth * 0.18;
  return { target, back, distance, middle };
}
