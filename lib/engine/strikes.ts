import { endOf, type Face } from './faces';
import type { FrontMeasure } from './openings';
import { crossing, outward, top, wallLength } from './plan';
import type { Quantities } from './quantities';
import type { Edition } from './edition-types';
import type { PlanPoint, Survey, Zone } from './types';

/** A door that strikes something before its hinges stop it (O6). */
export interface Strike {
  readonly zone: Zone;
  readonly mark: string;
  /** Whole degrees, down. */
  readonly angle: number;
  readonly opensTo: number;
  readonly against: 'wall' | 'appliance' | 'cabinet' | 'front';
  readonly what: string;
}

/**
 * Angle in degrees at which a point of a leaf reaches a plane that stands square to the closed leaf, `distance` beyond
 * the hinge's edge; `null` when it never does. `reach` is the point's distance along the leaf, `stand` out of the
 * hinge's plane; all in the same unit (O6).
 */
export function strikeAngle(reach: number, stand: number, distance: number): number | null {
  const radius = Math.hypot(reach, stand);
  if (distance >= radius) return null;
  const angle = Math.acos(-Math.max(0, distance) / radius) - Math.atan2(stand, reach);
  return (angle * 180) / Math.PI;
}

interface Plane {
  /** Along the wall. */
  readonly at: number;
  readonly bottom: number;
  readonly top: number;
  readonly against: Strike['against'];
  readonly what: string;
}

/** Planes square to a face's wall that a door on it may meet, on one side. */
function planesBeside(
  face: Face,
  side: 'left' | 'right',
  survey: Survey,
  q: Quantities,
  edition: Edition,
): Plane[] {
  const { wall, cabinet } = face;
  const planes: Plane[] = [];
  const sign = side === 'left' ? -1 : 1;
  const edge = side === 'left' ? face.at : endOf(face);
  const beyond = (at: number) => (at - edge) * sign >= -32;
  const front = cabinet.depth + edition.shop.bumper;

  const isCorner = (point: PlanPoint) =>
    survey.room.outline.some((one) => Math.hypot(one.x - point.x, one.y - point.y) <= 4);
  if (side === 'left' && isCorner(wall.from))
    planes.push({ at: 0, bottom: 0, top: survey.room.ceiling, against: 'wall', what: 'the wall' });
  if (side === 'right' && isCorner(wall.to)) {
    const at = wallLength(wall);
    planes.push({ at, bottom: 0, top: survey.room.ceiling, against: 'wall', what: 'the wall' });
  }
  for (const one of survey.appliances) {
    if (one.wall !== wall.id || one.within !== undefined) continue;
    const at = side === 'left' ? one.at + one.width : one.at;
    if (one.depth + (one.handle ?? 0) <= front + 64 || !beyond(at)) continue;
    planes.push({
      at,
      bottom: one.bottom,
      top: one.bottom + one.height,
      against: 'appliance',
      what: `the ${one.kind}`,
    });
  }
  for (const other of q.faces) {
    if (other === face) continue;
    const span = { bottom: other.cabinet.bottom, top: top(other.cabinet) };
    if (other.wall === wall) {
      const at = side === 'left' ? endOf(other) : other.at;
      if (other.cabinet.depth > front + 64 && beyond(at))
        planes.push({ at, ...span, against: 'cabinet', what: other.cabinet.id });
      continue;
    }
    if (other.cabinet.id === cabinet.id) continue;
    const made = q.made[other.cabinet.zone];
    const stands = other.cabinet.depth + edition.shop.bumper + made.style.thickness + made.pull.projection;
    const cross = crossing(wall, cabinet.depth, other.wall, stands);
    if (!cross || cross.atB < other.at - 64 || cross.atB > endOf(other) + 64 * 30) continue;
    const o = outward(other.wall);
    const mine = outward(wall);
    const towards = side === 'left' ? { x: -mine.y, y: mine.x } : { x: mine.y, y: -mine.x };
    // Its front looks back at this door when it faces against the direction in which the plane lies.
    if (o.x * towards.x + o.y * towards.y > -0.5 || !beyond(cross.atA)) continue;
    const nearest = Math.min(Math.abs(other.at - cross.atB), Math.abs(endOf(other) - cross.atB));
    if (nearest > 64 * 4) continue;
    planes.push({ at: cross.atA, ...span, against: 'front', what: `the fronts of ${other.cabinet.id}` });
  }
  return planes;
}

/** Every door that strikes before it is open, with the smallest angle at which it does (O6). */
export function strikes(survey: Survey, q: Quantities, edition: Edition): Strike[] {
  const found: Strike[] = [];
  for (const { face, openings } of q.measures) {
    const { cabinet } = face;
    const { style, pull, hingeSet } = q.made[cabinet.zone];
    for (const { placed, fronts } of openings) {
      if (placed.opening.kind !== 'door' && placed.opening.kind !== 'pair') continue;
      for (const front of fronts) {
        if (front.hinge === 'none') continue;
        const worst = worstOf(front, front.hinge);
        if (worst) found.push(worst);
      }
    }
    function worstOf(front: FrontMeasure, side: 'left' | 'right'): Strike | null {
      const hinge = face.at + (side === 'left' ? front.x : front.x + front.width);
      const lower = cabinet.bottom + front.y;
      let worst: Strike | null = null;
      for (const plane of planesBeside(face, side, survey, q, edition)) {
        if (plane.bottom >= lower + front.height || plane.top <= lower) continue;
        const distance = side === 'left' ? hinge - plane.at : plane.at - hinge;
        const corner = strikeAngle(front.width, style.thickness, distance);
        const handle =
          pull.form === 'none'
            ? null
            : strikeAngle(front.width - 80, style.thickness + pull.projection, distance);
        const angles = [corner, handle].filter((one) => one !== null);
        if (angles.length === 0) continue;
        const angle = Math.floor(Math.min(...angles));
        if (angle >= hingeSet.openingAngle || (worst && worst.angle <= angle)) continue;
        worst = {
          zone: cabinet.zone,
          mark: front.mark,
          angle,
          opensTo: hingeSet.openingAngle,
          against: plane.against,
          what: plane.what,
        };
      }
      return worst;
    }
  }
  return found;
}
