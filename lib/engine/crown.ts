import type { MouldingProfile, ShopSettings } from './edition-types';
import { roundUp, sixtyfourths } from './length';
import type { MouldingEnd, Sixtyfourths } from './types';

const radians = (degrees: number) => (degrees * Math.PI) / 180;
const degrees = (value: number) => (value * 180) / Math.PI;

/**
 * Saw settings for a moulding laid flat, in degrees (C1). `spring` is measured off the wall; `corner` is the angle,
 * at most 180°, between the two faces the moulding is fixed to: through the cabinet at an outside corner, through
 * the room at an inside one.
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
export function crownReach(profile: Pick<MouldingProfile, 'face' | 'spring'>): {
  drop: number;
  projection: number;
} {
  const s = radians(profile.spring / 1000);
  return { drop: profile.face * Math.cos(s), projection: profile.face * Math.sin(s) };
}

/** How far a moulding stands out of the face it is fixed to, in 64ths, not rounded. */
export const projectionOf = (profile: MouldingProfile): number =>
  profile.kind === 'crown' ? crownReach(profile).projection : profile.projection;

/** How a crown sits over one face (C3). */
export interface CrownFit {
  /** It stands on a nailer above the frame. */
  readonly nailer: boolean;
  /** How much of the frame's face it covers. */
  readonly seat: Sixtyfourths;
  /** Height of the strip that each opening under the top rail needs; 0 when none. */
  readonly filler: Sixtyfourths;
  readonly room: number;
  /** Rounded up to 1/64. */
  readonly drop: number;
  readonly freeFlat: number;
}

/**
 * The crown clearance rule (C3). `room` is what lies free between the frame's top and the ceiling or soffit; the
 * filler is seat + clearance − free flat, up to 1/16, where the free flat (top rail less the front's overlay) does
 * not reach. All in 64ths.
 */
export function crownFit(
  shop: Pick<ShopSettings, 'crownClearance'>,
  profile: Pick<MouldingProfile, 'face' | 'spring'>,
  room: number,
  topRail: number,
  overlayTop: number,
  hasFront: boolean,
): CrownFit {
  const drop = Math.ceil(crownReach(profile).drop);
  const freeFlat = topRail - (hasFront ? overlayTop : 0);
  if (room >= drop)
    return { nailer: true, seat: sixtyfourths(0), filler: sixtyfourths(0), room, drop, freeFlat };
  const seat = sixtyfourths(drop - Math.max(0, room));
  const short = seat + (hasFront ? shop.crownClearance : 0) - freeFlat;
  return {
    nailer: false,
    seat,
    filler: short > 0 ? roundUp(short, 16) : sixtyfourths(0),
    room,
    drop,
    freeFlat,
  };
}

/**
 * Height of the strip that a base moulding asks for in an opening on the bottom rail (C5): its upper edge stays below
 * the front's lower edge less the clearance. `openingBottom` is the opening's lower edge above the floor.
 */
export function baseFiller(
  shop: Pick<ShopSettings, 'baseClearance'>,
  profile: Pick<MouldingProfile, 'height'>,
  openingBottom: number,
  overlay: number,
  hasFront: boolean,
): Sixtyfourths {
  const short = hasFront
    ? profile.height + shop.baseClearance - (openingBottom - overlay)
    : profile.height - openingBottom;
  return short > 0 ? roundUp(short, 16) : sixtyfourths(0);
}

/** Height of what hides a fixture under a wall cabinet (C4): fixture + clearance − the lip that is there. */
export const valanceHeight = (
  shop: Pick<ShopSettings, 'valanceClearance'>,
  fixture: number,
  lip: number,
): Sixtyfourths => roundUp(Math.max(0, fixture + shop.valanceClearance - lip), 16);

/** The end of a moulding piece at a corner of so many degrees, angles in thousandths of a degree (C2). */
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

/** By how much a mitred end makes the front edge longer (outside) or shorter (inside) than the back, in 64ths (C2). */
export function edgeGain(kind: MouldingEnd['kind'], projection: number, corner: number): number {
  if (kind === 'stopped') return 0;
  const gain = projection * Math.tan(radians((180 - corner) / 2));
  return kind === 'outside' ? gain : -gain;
}
