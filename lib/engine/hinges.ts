import type { HingeSet } from './edition-types';

/**
 * Frame hinges of a leaf by the supplier's chart (H1): the larger of what its height and its weight ask for, and the
 * extra for its width. Sizes in 64ths, weight in thousandths of a pound; "up to" includes the limit. `null` past
 * the chart's last row.
 */
export function hingeCount(set: HingeSet, width: number, height: number, weight: number): number | null {
  const byHeight = set.byHeight.find((row) => height <= row.upTo);
  const byWeight = set.byWeight.find((row) => weight <= row.upTo);
  if (!byHeight || !byWeight) return null;
  const extra = set.extraAboveWidth && width > set.extraAboveWidth.width ? set.extraAboveWidth.hinges : 0;
  return Math.max(byHeight.hinges, byWeight.hinges) + extra;
}

export type FoldHinges =
  { readonly frame: number; readonly joint: number } | { readonly fault: 'chart' | 'noJoint' };

/** Hinges of a folding corner pair (H2): the hung leaf carries both leaves, the joint has its own set's hinges. */
export function foldHinges(set: HingeSet, width: number, height: number, weightOfBoth: number): FoldHinges {
  const frame = hingeCount(set, width, height, weightOfBoth);
  if (frame === null) return { fault: 'chart' };
  return set.fold ? { frame, joint: set.fold.hinges } : { fault: 'noJoint' };
}
