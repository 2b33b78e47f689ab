import type { Edition, MouldingProfile } from './edition-types';
import { roundUp, sixtyfourths } from './length';
import type { Cabinet, MouldingEnd, Sixtyfourths, Survey } from './types';

const radians = (degrees: number) => (degrees * Math.PI) / 180;
const degrees = (value: number) => (value * 180) / Math.PI;

/**
 * Saw settings for a moulding laid flat, in degrees (C1). `spring` is measured off the wall; `corner` is the angle,
 * at most 180°, between the two faces the moulding is fixed to.
 */
export function sawSettings(spring: number, corner: number): { miter: number; bevel: number } {
  const s = radians(spring);
  const half = radians(corner / 2);
  return {
    miter: degrees(Math.atan(Math.sin(s) / Math.tan(half))),
    bevel: degrees(Math.asin(Math.cos(s) * Math.cos(half))),
  };
}

/** Drop and projection of a crown whose flat face leans by its spring angle, in 64ths, not rounded (C1). */
export function crownReach(profile: MouldingProfile): { drop: number; projection: number } {
  const s = radians(profile.spring / 1000);
  return { drop: profile.face * Math.cos(s), projection: profile.face * Math.sin(s) };
}

/** Ceiling, or the soffit over the cabinet, above the floor. */
export function overhead(survey: Survey, cabinet: Cabinet): Sixtyfourths {
  const over = survey.room.soffits.filter(
    (soffit) =>
      soffit.wall === cabinet.wall &&
      soffit.at < cabinet.at + cabinet.width &&
      soffit.at + soffit.width > cabinet.at,
  );
  return sixtyfourths(Math.min(survey.room.ceiling, ...over.map((soffit) => soffit.bottom)));
}

/**
 * The crown clearance rule (C3). `room` is what lies free above the frame; the answer says whether the crown stands
 * on a nailer, or how high a filler strip each opening under the top rail needs (0 when none).
 */
export function crownFit(
  edition: Edition,
  profile: MouldingProfile,
  room: Sixtyfourths,
  topRail: Sixtyfourths,
  overlayTop: Sixtyfourths,
  hasFront: boolean,
): { readonly nailer: boolean; readonly filler: Sixtyfourths; readonly seat: Sixtyfourths } {
  const drop = Math.ceil(crownReach(profile).drop);
  if (room >= drop) return { nailer: true, filler: sixtyfourths(0), seat: sixtyfourths(0) };
  const seat = drop - Math.max(0, room);
  const clearance = hasFront ? edition.shop.crownClearance : 0;
  const free = topRail - (hasFront ? overlayTop : 0);
  const short = seat + clearance - free;
  return {
    nailer: false,
    filler: short > 0 ? roundUp(short, 16) : sixtyfourths(0),
    seat: sixtyfourths(seat),
  };
}

/** The end of a moulding piece, angles in thousandths of a degree. */
export function mouldingEnd(kind: MouldingEnd['kind'], spring: number, corner = 90): MouldingEnd {
  if (kind === 'stopped') return { kind, miter: 0, bevel: 0, longEdge: 'none' };
  const { miter, bevel } = sawSettings(spring / 1000, corner);
  return {
    kind,
    miter: Math.round(miter * 1000),
    bevel: Math.round(bevel * 1000),
    longEdge: kind === 'outside' ? 'front' : 'back',
  };
}
