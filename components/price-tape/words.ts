import type { PriceLine, ZoneOrKitchen } from '@/lib/engine/types';
import { formatCents } from '@/lib/engine/money';

/** From where the tape hangs. */
export type Baseline = 'firstEstimate' | 'signed';

export const BASELINE_NAMES: Readonly<Record<Baseline, string>> = {
  firstEstimate: 'the first estimate',
  signed: 'signed',
};

/** `$1,240` or `$1,240.50`, without a sign. */
const sum = (cents: number): string => formatCents(Math.abs(cents)).replace(/\.00$/, '');

/** `$1,240 more than the first estimate`, `the same as signed`. */
export function differenceWords(totalCents: number, baselineCents: number, baseline: Baseline): string {
  const difference = totalCents - baselineCents;
  if (difference === 0) return `the same as ${BASELINE_NAMES[baseline]}`;
  return `${sum(difference)} ${difference > 0 ? 'more' : 'less'} than ${BASELINE_NAMES[baseline]}`;
}

export const ZONE_NAMES: Readonly<Record<ZoneOrKitchen, string>> = {
  kitchen: 'Whole kitchen',
  wall: 'Wall cabinets',
  base: 'Base cabinets',
  island: 'Island',
  tall: 'Tall cabinets',
};

const ZONE_ORDER: readonly ZoneOrKitchen[] = ['wall', 'base', 'island', 'tall', 'kitchen'];

export interface LineGroup {
  readonly zone: ZoneOrKitchen;
  readonly name: string;
  readonly lines: readonly PriceLine[];
  readonly sumCents: number;
}

/** Price lines by zone, in the order one walks the kitchen; groups without lines are left out. */
export function groupLines(lines: readonly PriceLine[]): LineGroup[] {
  return ZONE_ORDER.flatMap((zone) => {
    const own = lines.filter((line) => line.zone === zone);
    if (own.length === 0) return [];
    const sumCents = own.reduce((total, line) => total + line.amount, 0);
    return [{ zone, name: ZONE_NAMES[zone], lines: own, sumCents }];
  });
}
