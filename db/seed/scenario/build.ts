import { inches } from '@/lib/engine/length';
import type {
  Appliance,
  Cabinet,
  FaceFrame,
  Filler,
  FrameLayout,
  Opening,
  PlanPoint,
  Wall,
  WallGap,
} from '@/lib/engine/types';

/** Surveys of the demo are written in inches; every size here is one. */
export const at = (x: number, y: number): PlanPoint => ({ x: inches(x), y: inches(y) });

export const wall = (id: string, name: string, from: PlanPoint, to: PlanPoint): Wall => ({
  id,
  name,
  kind: 'wall',
  from,
  to,
});

export const freestanding = (id: string, name: string, from: PlanPoint, to: PlanPoint): Wall => ({
  id,
  name,
  kind: 'freestanding',
  from,
  to,
});

/** What hangs now laps the frame by this on each side, and a pair leaves this between its leaves. */
const OLD_OVERLAY = 0.375;
const OLD_GAP = 0.125;

const oldFronts = (kind: Opening['kind'], width: number, height: number): Opening['existing'] => {
  const size = (w: number) => ({ width: inches(w), height: inches(height + 2 * OLD_OVERLAY) });
  if (kind === 'open') return [];
  if (kind === 'pair') {
    const leaf = (width + 2 * OLD_OVERLAY - OLD_GAP) / 2;
    return [size(leaf), size(leaf)];
  }
  if (kind === 'cornerFold') return [size(width)];
  return [size(width + 2 * OLD_OVERLAY)];
};

export const opening = (
  n: number,
  kind: Opening['kind'],
  width: number,
  height: number,
  more: Partial<Opening> = {},
): FrameLayout => ({
  opening: {
    n,
    kind,
    width: inches(width),
    height: inches(height),
    existing: oldFronts(kind, width, height),
    ...more,
  },
});

/** Side by side, with mullions of one width between. */
export const row = (member: number, ...parts: FrameLayout[]): FrameLayout => ({
  split: 'row',
  parts,
  members: parts.slice(1).map(() => inches(member)),
});

/** From the top down, with rails of one height between. */
export const column = (member: number, ...parts: FrameLayout[]): FrameLayout => ({
  split: 'column',
  parts,
  members: parts.slice(1).map(() => inches(member)),
});

export interface FrameMeasures {
  readonly left?: number;
  readonly right?: number;
  readonly top?: number;
  readonly bottom?: number;
}

export const frame = (layout: FrameLayout, measures: FrameMeasures = {}): FaceFrame => ({
  stileLeft: inches(measures.left ?? 1.5),
  stileRight: inches(measures.right ?? 1.5),
  railTop: inches(measures.top ?? 1.5),
  railBottom: inches(measures.bottom ?? 1.5),
  thickness: inches(0.75),
  layout,
});

interface Placed {
  readonly wall: string;
  readonly at: number;
  readonly width: number;
  readonly height: number;
  readonly bottom: number;
  readonly depth: number;
}

const cabinet = (
  id: string,
  placed: Placed,
  tier: Cabinet['tier'],
  its: FaceFrame,
  more: Partial<Cabinet>,
): Cabinet => ({
  id,
  wall: placed.wall,
  zone: tier,
  tier,
  at: inches(placed.at),
  width: inches(placed.width),
  height: inches(placed.height),
  bottom: inches(placed.bottom),
  depth: inches(placed.depth),
  frame: its,
  left: { exposed: false },
  right: { exposed: false },
  box: 'faceFrame',
  action: 'reface',
  material: 'wood',
  bondTest: 'passed',
  condition: 'sound',
  coated: true,
  joinedRight: true,
  ...more,
});

/** A base cabinet: 34 1/2 high on a toe space of 4, 24 deep. */
export const base = (
  id: string,
  place: number,
  width: number,
  layout: FrameLayout,
  more: Partial<Cabinet> = {},
): Cabinet =>
  cabinet(
    id,
    { wall: id.split('-')[0] ?? '', at: place, width, height: 30.5, bottom: 4, depth: 24 },
    'base',
    frame(layout),
    { toe: { height: inches(4), depth: inches(3) }, ...more },
  );

/** A wall cabinet. */
export const upper = (
  id: string,
  place: { readonly at: number; readonly width: number; readonly bottom: number; readonly height: number },
  its: FaceFrame,
  more: Partial<Cabinet> & { readonly deep?: number } = {},
): Cabinet => {
  const { deep, ...rest } = more;
  return cabinet(id, { wall: id.split('-')[0] ?? '', depth: deep ?? 12, ...place }, 'wall', its, rest);
};

/** A tall cabinet on a toe space of 4. */
export const tall = (
  id: string,
  place: { readonly at: number; readonly width: number; readonly height: number },
  its: FaceFrame,
  more: Partial<Cabinet> = {},
): Cabinet =>
  cabinet(id, { wall: id.split('-')[0] ?? '', depth: 24, bottom: 4, ...place }, 'tall', its, {
    toe: { height: inches(4), depth: inches(3) },
    ...more,
  });

export interface CornerMeasures {
  readonly legA: number;
  readonly legB: number;
  readonly otherWall: string;
  readonly height: number;
  readonly depth: number;
  readonly top?: number;
  readonly hung: 'left' | 'right';
}

/**
 * The frames of a folding corner whose first leg ends at its wall's right end: no stile at the inner corner, so the
 * opening of a leg is leg − depth − outer stile.
 */
export function cornerFrames(measures: CornerMeasures): {
  readonly frame: FaceFrame;
  readonly corner: Cabinet['corner'];
} {
  const { legA, legB, depth, height } = measures;
  const top = measures.top ?? 1.5;
  const clear = height - top - 1.5;
  const leaf = (leg: number) => opening(1, 'cornerFold', leg - depth - 1.5, clear, { hinge: measures.hung });
  return {
    frame: frame(leaf(legA), { right: 0, top }),
    corner: {
      otherWall: measures.otherWall,
      legA: inches(legA),
      legB: inches(legB),
      frameB: frame(leaf(legB), { left: 0, top }),
    },
  };
}

export const appliance = (
  id: string,
  kind: Appliance['kind'],
  placed: Placed,
  more: Partial<Appliance> = {},
): Appliance => ({
  id,
  kind,
  wall: placed.wall,
  at: inches(placed.at),
  width: inches(placed.width),
  bottom: inches(placed.bottom),
  height: inches(placed.height),
  depth: inches(placed.depth),
  ...more,
});

export const gap = (
  id: string,
  kind: WallGap['kind'],
  placed: Omit<Placed, 'depth'>,
  casing: number,
): WallGap => ({
  id,
  kind,
  wall: placed.wall,
  at: inches(placed.at),
  width: inches(placed.width),
  bottom: inches(placed.bottom),
  height: inches(placed.height),
  casing: inches(casing),
});

export const filler = (id: string, tier: Filler['tier'], placed: Omit<Placed, 'depth'>): Filler => ({
  id,
  wall: placed.wall,
  tier,
  at: inches(placed.at),
  width: inches(placed.width),
  bottom: inches(placed.bottom),
  height: inches(placed.height),
});

/** Drawers from the top down, each of its own height. */
export const drawers = (width: number, ...heights: number[]): FrameLayout =>
  column(1.5, ...heights.map((height, index) => opening(index + 1, 'drawer', width, height)));

/** A drawer over a door or a pair, as base cabinets of 30 1/2 in mostly are. */
export const drawerOver = (
  width: number,
  kind: 'door' | 'pair',
  more: Partial<Opening> = {},
  top: 'drawer' | 'falseFront' | 'tiltOut' = 'drawer',
): FrameLayout => column(1.5, opening(1, top, width, 5), opening(2, kind, width, 21, more));
