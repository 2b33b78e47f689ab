import { EngineError } from './error';
import { placeFrame, type PlacedFrame } from './frame';
import { isRenewed, pointOn, top } from './plan';
import type { Cabinet, FaceFrame, Filler, Survey, Wall } from './types';

/** Faces that stand closer than this are neighbours: a quarter inch, which leaves room for an end panel. */
const NEAR = 16;
/** Edges that agree within this are one line: 1/16 in (C2). */
export const LEVEL = 4;

/** What is beside one side of a face. */
export type Side =
  | { readonly kind: 'exposed' }
  /** The inner corner of a corner cabinet: no stile. */
  | { readonly kind: 'innerCorner' }
  /** Another face of the same wall and tier; `gap` between the two frames, `filler` if one fills it. */
  | {
      readonly kind: 'face';
      readonly face: number;
      readonly gap: number;
      readonly filler: Filler | undefined;
    }
  /** A wall, an appliance or nothing; a filler may stand between. */
  | { readonly kind: 'other'; readonly filler: Filler | undefined };

/** One face of a cabinet: its frame in place on a wall. A corner cabinet has two. */
export interface Face {
  readonly index: number;
  readonly cabinet: Cabinet;
  readonly wall: Wall;
  readonly leg: 'A' | 'B' | null;
  readonly frame: FaceFrame;
  /** The frame's left edge along its wall, and its width. */
  readonly at: number;
  readonly width: number;
  readonly placed: PlacedFrame;
  readonly renewed: boolean;
  /** Ceiling or soffit above it, from the floor. */
  readonly overhead: number;
  /** A wall cabinet close above an appliance: no light rail goes under it (C4). */
  readonly standsOver: boolean;
  readonly left: Side;
  readonly right: Side;
}

export const endOf = (face: Face): number => face.at + face.width;

interface Standing {
  readonly cabinet: Cabinet;
  readonly wall: Wall;
  readonly leg: Face['leg'];
  readonly frame: FaceFrame;
  readonly at: number;
  readonly width: number;
  readonly innerCorner: 'left' | 'right' | null;
}

const wallOf = (survey: Survey, id: string): Wall => {
  const wall = survey.walls.find((one) => one.id === id);
  if (!wall) throw new EngineError('unknownWall', id);
  return wall;
};

/** On which side of its own wall a corner cabinet's corner lies (S3). */
export function cornerSide(survey: Survey, cabinet: Cabinet): 'left' | 'right' {
  const { corner } = cabinet;
  if (!corner) throw new EngineError('badCorner', cabinet.id);
  const wall = wallOf(survey, cabinet.wall);
  const other = wallOf(survey, corner.otherWall);
  const far = (at: number, end: { x: number; y: number }) => {
    const point = pointOn(wall, at, 0);
    return Math.hypot(point.x - end.x, point.y - end.y);
  };
  const right = far(cabinet.at + corner.legA, other.from);
  const left = far(cabinet.at, other.to);
  return left < right ? 'left' : 'right';
}

function standing(survey: Survey, cabinet: Cabinet): Standing[] {
  const wall = wallOf(survey, cabinet.wall);
  const { corner, frame } = cabinet;
  if (!corner)
    return [{ cabinet, wall, leg: null, frame, at: cabinet.at, width: cabinet.width, innerCorner: null }];
  const other = wallOf(survey, corner.otherWall);
  const side = cornerSide(survey, cabinet);
  const spanA = corner.legA - cabinet.depth;
  const spanB = corner.legB - cabinet.depth;
  const otherEnd = Math.round(Math.hypot(other.to.x - other.from.x, other.to.y - other.from.y));
  return side === 'right'
    ? [
        { cabinet, wall, leg: 'A', frame, at: cabinet.at, width: spanA, innerCorner: 'right' },
        {
          cabinet,
          wall: other,
          leg: 'B',
          frame: corner.frameB,
          at: cabinet.depth,
          width: spanB,
          innerCorner: 'left',
        },
      ]
    : [
        {
          cabinet,
          wall,
          leg: 'A',
          frame,
          at: cabinet.at + cabinet.depth,
          width: spanA,
          innerCorner: 'left',
        },
        {
          cabinet,
          wall: other,
          leg: 'B',
          frame: corner.frameB,
          at: otherEnd - corner.legB,
          width: spanB,
          innerCorner: 'right',
        },
      ];
}

function overheadOf(survey: Survey, one: Standing): number {
  let least: number = survey.room.ceiling;
  for (const soffit of survey.room.soffits) {
    const over =
      soffit.wall === one.wall.id && soffit.at < one.at + one.width && soffit.at + soffit.width > one.at;
    if (over && soffit.bottom < least) least = soffit.bottom;
  }
  return least;
}

/** An appliance less than this under a wall cabinet leaves no counter to light: a foot. */
const CLOSE_UNDER = 12 * 64;

const standsOver = (survey: Survey, one: Standing): boolean =>
  survey.appliances.some(
    (appliance) =>
      appliance.wall === one.wall.id &&
      appliance.within === undefined &&
      appliance.at < one.at + one.width - LEVEL &&
      appliance.at + appliance.width > one.at + LEVEL &&
      appliance.bottom < one.cabinet.bottom &&
      appliance.bottom + appliance.height > one.cabinet.bottom - CLOSE_UNDER,
  );

/** Whether two cabinets stand in one band of the wall, so that their stiles can meet. */
const sameBand = (a: Cabinet, b: Cabinet): boolean => a.bottom < top(b) - LEVEL && b.bottom < top(a) - LEVEL;

/** Every face of a survey with what stands beside it; in the order of the survey's cabinets. */
export function facesOf(survey: Survey): Face[] {
  const all = survey.cabinets
    .filter((cabinet) => cabinet.action !== 'remove')
    .flatMap((cabinet) => standing(survey, cabinet));
  const byWall = new Map<string, number[]>();
  all.forEach((one, index) => {
    const here = byWall.get(one.wall.id);
    if (here) here.push(index);
    else byWall.set(one.wall.id, [index]);
  });
  for (const here of byWall.values()) here.sort((a, b) => (all[a]?.at ?? 0) - (all[b]?.at ?? 0));

  const fillerBeside = (one: Standing, edge: number, side: 'left' | 'right'): Filler | undefined =>
    survey.fillers.find(
      (filler) =>
        filler.wall === one.wall.id &&
        filler.tier === one.cabinet.tier &&
        Math.abs((side === 'left' ? filler.at + filler.width : filler.at) - edge) <= NEAR,
    );

  const beside = (index: number, one: Standing, side: 'left' | 'right'): Side => {
    if (one.innerCorner === side) return { kind: 'innerCorner' };
    // Of a corner cabinet each leg has one outer side, and `left` and `right` are meant as seen from the room.
    if (one.cabinet[side].exposed) return { kind: 'exposed' };
    const edge = side === 'left' ? one.at : one.at + one.width;
    const filler = fillerBeside(one, edge, side);
    const reach = filler ? (side === 'left' ? filler.at : filler.at + filler.width) : edge;
    const here = byWall.get(one.wall.id) ?? [];
    let nearest: number | null = null;
    for (const candidate of here) {
      const other = all[candidate];
      if (candidate === index || !other || !sameBand(one.cabinet, other.cabinet)) continue;
      const gap = side === 'left' ? reach - (other.at + other.width) : other.at - reach;
      if (gap >= -LEVEL && gap <= NEAR) nearest ??= candidate;
    }
    const found = nearest === null ? undefined : all[nearest];
    if (nearest === null || !found) return { kind: 'other', filler };
    const gap = side === 'left' ? edge - (found.at + found.width) : found.at - edge;
    return { kind: 'face', face: nearest, gap: Math.max(0, gap), filler };
  };

  return all.map((one, index) => ({
    index,
    cabinet: one.cabinet,
    wall: one.wall,
    leg: one.leg,
    frame: one.frame,
    at: one.at,
    width: one.width,
    placed: placeFrame(one.frame, one.width, one.cabinet.height),
    renewed: isRenewed(one.cabinet),
    overhead: overheadOf(survey, one),
    standsOver: standsOver(survey, one),
    left: beside(index, one, 'left'),
    right: beside(index, one, 'right'),
  }));
}
