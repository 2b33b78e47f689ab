import type { Face } from './faces';
import { top } from './plan';
import type { FrameLayout, Opening, Survey } from './types';

/** Square 64ths to a square foot. */
const SQUARE_FOOT = 589_824;

function openingsIn(layout: FrameLayout): readonly Opening[] {
  return 'opening' in layout ? [layout.opening] : layout.parts.flatMap(openingsIn);
}

export interface LeadReading {
  /** The house may hold lead paint: built before the rule set's year, or the year is not known. */
  readonly applies: boolean;
  /** Painted or varnished face disturbed, hundredths of a square foot, half up. */
  readonly area: number;
  readonly overLimit: boolean;
}

/**
 * Painted or varnished area that the work disturbs (L5, 40 CFR 745): both faces of each front that comes off at its
 * surveyed size, and the frames that are sanded and veneered where they are coated. `limit` in hundredths of a square
 * foot, `builtBefore` a year.
 */
export function leadReading(
  survey: Survey,
  faces: readonly Face[],
  rule: { readonly builtBefore: number; readonly limit: number },
): LeadReading {
  let area = 0;
  for (const { cabinet, frame, renewed, width } of faces) {
    if (!renewed || !cabinet.coated) continue;
    const openings = openingsIn(frame.layout);
    for (const { existing } of openings) for (const front of existing) area += 2 * front.width * front.height;
    if (cabinet.action !== 'reface') continue;
    const open = openings.reduce((sum, one) => sum + one.width * one.height, 0);
    area += Math.max(0, width * cabinet.height - open);
  }
  const hundredthsOfFoot = Math.floor((area * 100) / SQUARE_FOOT + 0.5);
  const applies = survey.yearBuilt === null || survey.yearBuilt < rule.builtBefore;
  return { applies, area: hundredthsOfFoot, overLimit: applies && hundredthsOfFoot > rule.limit };
}

export interface RangeReading {
  readonly range: string;
  readonly cabinet: string;
  /** 64ths between the cooking top and the cabinet's lower edge. */
  readonly clear: number;
  readonly needed: number;
  /** A hood hangs between the two. */
  readonly guarded: boolean;
}

/** Cabinets over a range or cooktop that are nearer than the rule set asks (L6). */
export function rangeReadings(
  survey: Survey,
  faces: readonly Face[],
  rule: { readonly unguarded: number; readonly guarded: number },
): RangeReading[] {
  const found: RangeReading[] = [];
  for (const range of survey.appliances) {
    if (range.kind !== 'range' && range.kind !== 'cooktop') continue;
    const cookTop = range.bottom + range.height;
    const over = (at: number, width: number) => at < range.at + range.width - 4 && at + width > range.at + 4;
    const hood = survey.appliances.some(
      (one) => one.kind === 'hood' && one.wall === range.wall && over(one.at, one.width),
    );
    const needed = hood ? rule.guarded : rule.unguarded;
    for (const { cabinet, wall, at, width, leg } of faces) {
      if (wall.id !== range.wall || leg === 'B' || top(cabinet) <= cookTop || cabinet.tier !== 'wall')
        continue;
      if (!over(at, width)) continue;
      const clear = cabinet.bottom - cookTop;
      if (clear < needed) found.push({ range: range.id, cabinet: cabinet.id, clear, needed, guarded: hood });
    }
  }
  return found;
}
