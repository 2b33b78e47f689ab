import { sixtyfourths } from './length';
import type { FaceFrame, FrameLayout, Opening, Sixtyfourths } from './types';

/** A rectangle on a frame's face; x from its left edge, y from its lower edge. */
export interface FrameRect {
  readonly x: Sixtyfourths;
  readonly y: Sixtyfourths;
  readonly width: Sixtyfourths;
  readonly height: Sixtyfourths;
}

export interface PlacedOpening extends FrameRect {
  readonly opening: Opening;
  /** Width of the member on each side: a stile, a mullion or a rail. */
  readonly left: Sixtyfourths;
  readonly right: Sixtyfourths;
  readonly above: Sixtyfourths;
  readonly below: Sixtyfourths;
  /** The member above is the frame's own top rail. */
  readonly underTopRail: boolean;
  readonly onBottomRail: boolean;
  readonly besideLeftStile: boolean;
  readonly besideRightStile: boolean;
}

export interface FrameMember extends FrameRect {
  readonly kind: 'stile' | 'rail' | 'mullion';
  readonly part: 'stileLeft' | 'stileRight' | 'railTop' | 'railBottom' | 'between';
  /** A mullion that is framed into the top or the bottom rail. */
  readonly underTopRail?: boolean;
  readonly onBottomRail?: boolean;
}

export interface PlacedFrame {
  readonly openings: readonly PlacedOpening[];
  readonly members: readonly FrameMember[];
}

/** Width and height of a layout as surveyed; of a split, the sum of its parts and members (S1). */
export function layoutSize(layout: FrameLayout): { width: number; height: number } {
  if ('opening' in layout) {
    const { width, widthSecond, height } = layout.opening;
    return { width: Math.min(width, widthSecond ?? width), height };
  }
  const sizes = layout.parts.map(layoutSize);
  const members = layout.members.reduce<number>((a, b) => a + b, 0);
  const sum = (pick: (size: { width: number; height: number }) => number) =>
    sizes.reduce((total, size) => total + pick(size), 0);
  const least = (pick: (size: { width: number; height: number }) => number) => Math.min(...sizes.map(pick));
  return layout.split === 'row'
    ? { width: sum((s) => s.width) + members, height: least((s) => s.height) }
    : { width: least((s) => s.width), height: sum((s) => s.height) + members };
}

interface Around {
  left: number;
  right: number;
  above: number;
  below: number;
  top: boolean;
  bottom: boolean;
  leftStile: boolean;
  rightStile: boolean;
}

/** Every opening and member of a frame in place. `height` is the frame's, toe space excluded. */
export function placeFrame(frame: FaceFrame, width: number, height: number): PlacedFrame {
  const openings: PlacedOpening[] = [];
  const members: FrameMember[] = [];
  if (frame.stileLeft > 0)
    members.push({ kind: 'stile', part: 'stileLeft', ...rect(0, 0, frame.stileLeft, height) });
  if (frame.stileRight > 0)
    members.push({
      kind: 'stile',
      part: 'stileRight',
      ...rect(width - frame.stileRight, 0, frame.stileRight, height),
    });
  const clear = width - frame.stileLeft - frame.stileRight;
  if (frame.railTop > 0)
    members.push({
      kind: 'rail',
      part: 'railTop',
      ...rect(frame.stileLeft, height - frame.railTop, clear, frame.railTop),
    });
  if (frame.railBottom > 0)
    members.push({ kind: 'rail', part: 'railBottom', ...rect(frame.stileLeft, 0, clear, frame.railBottom) });

  function walk(layout: FrameLayout, x: number, top: number, w: number, h: number, around: Around): void {
    if ('opening' in layout) {
      const { opening } = layout;
      openings.push({
        opening,
        ...rect(
          x,
          top - opening.height,
          Math.min(opening.width, opening.widthSecond ?? opening.width),
          opening.height,
        ),
        left: sixtyfourths(around.left),
        right: sixtyfourths(around.right),
        above: sixtyfourths(around.above),
        below: sixtyfourths(around.below),
        underTopRail: around.top,
        onBottomRail: around.bottom,
        besideLeftStile: around.leftStile,
        besideRightStile: around.rightStile,
      });
      return;
    }
    let along = layout.split === 'row' ? x : top;
    layout.parts.forEach((part, index) => {
      const size = layoutSize(part);
      const before = layout.members[index - 1];
      const after = layout.members[index];
      if (layout.split === 'row') {
        walk(part, along, top, size.width, h, {
          ...around,
          left: before ?? around.left,
          right: after ?? around.right,
          leftStile: before === undefined && around.leftStile,
          rightStile: after === undefined && around.rightStile,
        });
        along += size.width;
        if (after !== undefined) {
          members.push({
            kind: 'mullion',
            part: 'between',
            underTopRail: around.top,
            onBottomRail: around.bottom,
            ...rect(along, top - h, after, h),
          });
          along += after;
        }
      } else {
        walk(part, x, along, w, size.height, {
          ...around,
          above: before ?? around.above,
          below: after ?? around.below,
          top: before === undefined && around.top,
          bottom: after === undefined && around.bottom,
        });
        along -= size.height;
        if (after !== undefined) {
          along -= after;
          members.push({ kind: 'rail', part: 'between', ...rect(x, along, w, after) });
        }
      }
    });
  }

  walk(
    frame.layout,
    frame.stileLeft,
    height - frame.railTop,
    clear,
    height - frame.railTop - frame.railBottom,
    {
      left: frame.stileLeft,
      right: frame.stileRight,
      above: frame.railTop,
      below: frame.railBottom,
      top: true,
      bottom: true,
      leftStile: true,
      rightStile: true,
    },
  );
  return { openings, members };
}

const rect = (x: number, y: number, width: number, height: number): FrameRect => ({
  x: sixtyfourths(x),
  y: sixtyfourths(y),
  width: sixtyfourths(width),
  height: sixtyfourths(height),
});
