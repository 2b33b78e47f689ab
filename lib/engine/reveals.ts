import type { Face } from './faces';
import type { PlacedOpening } from './frame';
import { foldSide, markOf } from './openings';
import type { Quantities } from './quantities';
import type { Zone } from './types';

/** A member that shows too little between fronts (O3). Lengths in 64ths. */
export interface RevealFault {
  readonly zone: Zone;
  readonly marks: readonly string[];
  readonly where: 'mullion' | 'rail' | 'seam' | 'side';
  readonly reveal: number;
  readonly needed: number;
  /** The largest overlay on both sides that leaves what is needed, down to 1/16. */
  readonly largest: number;
}

const hasFront = (placed: PlacedOpening): boolean => placed.opening.kind !== 'open';

/** Whether a leaf of an opening hangs on the member at one of its sides. */
function hangsOn(face: Face, placed: PlacedOpening, side: 'left' | 'right'): boolean {
  const { kind, hinge = 'left' } = placed.opening;
  if (kind === 'pair') return true;
  if (kind === 'door') return hinge === side;
  return kind === 'cornerFold' && hinge === side && foldSide(face) === side;
}

/** Reveal on a member between two fronts: its width less both overlays (O3). */
export const reveal = (member: number, overlayA: number, overlayB: number): number =>
  member - overlayA - overlayB;

const down = (value: number): number => Math.max(0, Math.floor(value / 4) * 4);

const meets = (a: number, aSize: number, b: number, bSize: number): boolean => a < b + bSize && b < a + aSize;

/** Every member that shows less than what is needed (O3): hinges on it added up, between rows the style's row gap. */
export function revealFaults(q: Quantities): RevealFault[] {
  const faults: RevealFault[] = [];
  for (const face of q.faces) {
    if (!face.renewed) continue;
    const { zone } = face.cabinet;
    const { overlay, hingeSet, style } = q.made[zone];
    const o = overlay.amount;
    const { openings, members } = face.placed;
    const judge = (
      where: RevealFault['where'],
      marks: readonly string[],
      member: number,
      overlays: readonly number[],
      needed: number,
    ) => {
      const left = overlays.reduce((rest, one) => rest - one, member);
      if (left >= needed) return;
      const largest = overlays.length === 0 ? 0 : down((member - needed) / overlays.length);
      faults.push({ zone, marks, where, reveal: left, needed, largest });
    };

    for (const member of members) {
      if (member.part !== 'between') continue;
      const upright = member.kind === 'mullion';
      const before = openings.filter((one) =>
        upright
          ? one.x + one.width === member.x && meets(one.y, one.height, member.y, member.height)
          : one.y === member.y + member.height && meets(one.x, one.width, member.x, member.width),
      );
      const after = openings.filter((one) =>
        upright
          ? one.x === member.x + member.width && meets(one.y, one.height, member.y, member.height)
          : one.y + one.height === member.y && meets(one.x, one.width, member.x, member.width),
      );
      for (const a of before)
        for (const b of after) {
          const across = upright ? meets(a.y, a.height, b.y, b.height) : meets(a.x, a.width, b.x, b.width);
          const fronts = [a, b].filter(hasFront);
          if (!across || fronts.length === 0) continue;
          const needed = upright
            ? hingeSet.smallestReveal *
              ((hangsOn(face, a, 'right') ? 1 : 0) + (hangsOn(face, b, 'left') ? 1 : 0))
            : fronts.length === 2
              ? style.smallestRowGap
              : 0;
          judge(
            upright ? 'mullion' : 'rail',
            fronts.map((one) => markOf(face, one.opening)),
            upright ? member.width : member.height,
            fronts.map(() => o),
            needed,
          );
        }
    }

    for (const side of ['left', 'right'] as const) {
      const beside = face[side];
      if (beside.kind === 'innerCorner') continue;
      const stile = side === 'left' ? face.frame.stileLeft : face.frame.stileRight;
      const mine = openings.filter(
        (one) => hasFront(one) && (side === 'left' ? one.besideLeftStile : one.besideRightStile),
      );
      const other = beside.kind === 'face' ? q.faces[beside.face] : undefined;
      if (other?.renewed && beside.kind === 'face') {
        // The seam is judged once, from its left.
        if (side === 'left') continue;
        const theirs = q.made[other.cabinet.zone];
        const facing = other.placed.openings.filter((one) => hasFront(one) && one.besideLeftStile);
        for (const a of mine)
          for (const b of facing) {
            const ay = face.cabinet.bottom + a.y;
            const by = other.cabinet.bottom + b.y;
            if (!meets(ay, a.height, by, b.height)) continue;
            judge(
              'seam',
              [markOf(face, a.opening), markOf(other, b.opening)],
              stile + beside.gap + other.frame.stileLeft,
              [o, theirs.overlay.amount],
              (hangsOn(face, a, 'right') ? hingeSet.smallestReveal : 0) +
                (hangsOn(other, b, 'left') ? theirs.hingeSet.smallestReveal : 0),
            );
          }
        continue;
      }
      const filler = beside.kind === 'other' ? (beside.filler?.width ?? 0) : 0;
      for (const a of mine)
        judge(
          'side',
          [markOf(face, a.opening)],
          stile + filler,
          [o],
          hangsOn(face, a, side) ? hingeSet.smallestReveal : 0,
        );
    }
  }
  return faults;
}
