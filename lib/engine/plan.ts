import { sixtyfourths } from './length';
import type { Cabinet, PlanPoint, Wall } from './types';

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

/** In 64ths, to the nearest. */
export const wallLength = (wall: Wall): number =>
  Math.round(Math.hypot(wall.to.x - wall.from.x, wall.to.y - wall.from.y));

/** The plan point `at` along a wall and `out` in front of it, to the nearest 64th. */
export function pointOn(wall: Wall, at: number, out: number): PlanPoint {
  const a = along(wall);
  const o = outward(wall);
  return {
    x: sixtyfourths(Math.round(wall.from.x + a.x * at + o.x * out)),
    y: sixtyfourths(Math.round(wall.from.y + a.y * at + o.y * out)),
  };
}

/** How far along a wall and how far out of it a plan point lies. */
export function placeOn(wall: Wall, point: PlanPoint): { at: number; out: number } {
  const a = along(wall);
  const o = outward(wall);
  const dx = point.x - wall.from.x;
  const dy = point.y - wall.from.y;
  return { at: dx * a.x + dy * a.y, out: dx * o.x + dy * o.y };
}

/** Where two lines in front of two walls cross, as places along each; `null` when they are parallel. */
export function crossing(
  a: Wall,
  outA: number,
  b: Wall,
  outB: number,
): { readonly atA: number; readonly atB: number } | null {
  const pa = pointOn(a, 0, outA);
  const pb = pointOn(b, 0, outB);
  const da = along(a);
  const db = along(b);
  const cross = da.x * db.y - da.y * db.x;
  if (Math.abs(cross) < 1e-6) return null;
  const dx = pb.x - pa.x;
  const dy = pb.y - pa.y;
  return { atA: (dx * db.y - dy * db.x) / cross, atB: (dx * da.y - dy * da.x) / cross };
}

/** A cabinet whose face is renewed. */
export const isRenewed = (cabinet: Cabinet): boolean =>
  cabinet.action === 'reface' || cabinet.action === 'replace' || cabinet.action === 'add';

/** Height of a cabinet's upper edge above the floor. */
export const top = (cabinet: Cabinet): number => cabinet.bottom + cabinet.height;
