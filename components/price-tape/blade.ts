/** Geometry of the price tape. Sums in integer cents, places in per cent of the window's width. */

const TICK = 100_00;
const NUMERAL = 1_000_00;

export interface BladeTick {
  readonly cents: number;
  readonly place: number;
  readonly numeral: boolean;
}

export interface Blade {
  readonly fromCents: number;
  readonly toCents: number;
  readonly ticks: readonly BladeTick[];
  /** Where the tape is hooked, clamped to the window. */
  readonly hook: number;
  /** On which side of the window the hook lies, when it is outside. */
  readonly hookBeyond: 'left' | 'right' | null;
  /** Where the blade ends: today's total. */
  readonly end: number;
}

const floorTo = (value: number, step: number): number => Math.floor(value / step) * step;
const ceilTo = (value: number, step: number): number => Math.ceil(value / step) * step;

function lay(fromCents: number, toCents: number, baselineCents: number, totalCents: number): Blade {
  const place = (cents: number): number =>
    Math.min(100, Math.max(0, ((cents - fromCents) / (toCents - fromCents)) * 100));
  const ticks: BladeTick[] = [];
  for (let cents = ceilTo(fromCents, TICK); cents <= toCents; cents += TICK)
    ticks.push({ cents, place: place(cents), numeral: cents % NUMERAL === 0 });
  return {
    fromCents,
    toCents,
    ticks,
    hook: place(baselineCents),
    hookBeyond: baselineCents < fromCents ? 'left' : baselineCents > toCents ? 'right' : null,
    end: place(totalCents),
  };
}

/**
 * The phone's blade: a window of $2,000 to either side of the total, which moves in whole thousands so that small
 * changes move the blade and not the window.
 */
export function shortBlade(baselineCents: number, totalCents: number): Blade {
  const centre = Math.round(totalCents / NUMERAL) * NUMERAL;
  return lay(centre - 2 * NUMERAL, centre + 2 * NUMERAL, baselineCents, totalCents);
}

/** The laptop's blade: hook and end both in sight with some steel before them, at least $5,000 wide. */
export function longBlade(baselineCents: number, totalCents: number): Blade {
  const low = Math.min(baselineCents, totalCents);
  const high = Math.max(baselineCents, totalCents);
  const from = floorTo(low - 28 * TICK, NUMERAL);
  const to = Math.max(from + 5 * NUMERAL, ceilTo(high + 8 * TICK, NUMERAL));
  return lay(from, to, baselineCents, totalCents);
}
