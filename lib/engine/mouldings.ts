import { edgeGain, mouldingEnd, projectionOf } from './crown';
import type { Edition, MouldingProfile } from './edition-types';
import { endOf, LEVEL, type Face } from './faces';
import { sixtyfourths } from './length';
import type { Made, MadeByZone } from './made';
import type { FaceMeasure } from './openings';
import { crossing, outward, pointOn, top } from './plan';
import { ZONES, type MouldingEnd, type MouldingPiece, type PlanPoint, type Wall, type Zone } from './types';

export type MouldingKind = 'crown' | 'base' | 'lightRail';
export const MOULDING_KINDS: readonly MouldingKind[] = ['crown', 'base', 'lightRail'];

/** Neighbouring faces on one wall along which one moulding goes, from left to right. */
interface Group {
  readonly wall: Wall;
  readonly faces: readonly Face[];
  readonly profile: MouldingProfile;
  /** Same profile, wood and finish: only then is it one moulding. */
  readonly look: string;
  readonly level: number;
  /** Ends along the wall, fillers and end panels included. */
  readonly from: number;
  readonly to: number;
}

/** One straight stretch of a moulding's back, in plan, from left to right as seen from the room. */
interface Stretch {
  readonly wall: Wall;
  readonly face: Face;
  readonly from: PlanPoint;
  readonly to: PlanPoint;
  readonly role: 'run' | 'return' | 'step' | 'back';
}

/** A moulding in one go: its stretches meet at mitres. */
export interface MouldingLine {
  readonly kind: MouldingKind;
  readonly profile: MouldingProfile;
  readonly zone: Zone;
  readonly faces: readonly Face[];
  readonly stretches: readonly Stretch[];
  readonly path: readonly PlanPoint[];
  readonly closed: boolean;
  readonly level: number;
}

/** A piece before wood and finish are named; lengths in 64ths. */
export type PieceMeasure = Omit<MouldingPiece, 'species' | 'finish'>;

export interface MouldingMeasure {
  readonly lines: readonly MouldingLine[];
  readonly pieces: readonly PieceMeasure[];
  /** Long edges and nailers by zone, 64ths. */
  readonly length: Readonly<Record<Zone, number>>;
  readonly nailer: Readonly<Record<Zone, number>>;
}

const profileFor = (made: Made, kind: MouldingKind): MouldingProfile | null => made[kind];

const takes = (face: Face, kind: MouldingKind): boolean => {
  if (!face.renewed) return false;
  const { tier } = face.cabinet;
  if (kind === 'lightRail') return tier === 'wall' && !face.standsOver;
  return kind === 'crown' ? tier !== 'base' : tier !== 'wall';
};

const levelOf = (face: Face, kind: MouldingKind): number =>
  kind === 'crown' ? top(face.cabinet) : kind === 'base' ? 0 : face.cabinet.bottom;

/** What tells two zones' mouldings of a kind apart; equal texts are one moulding. */
export const lookOf = (made: Made, kind: MouldingKind): string =>
  `${profileFor(made, kind)?.id ?? ''} ${made.species.id} ${made.finish.id}`;

/** Two keys are equal when every line of that kind is the same in both (zones are grouped alike). */
export function mouldingKey(made: MadeByZone, kind: MouldingKind): string {
  const looks = ZONES.map((zone) => lookOf(made[zone], kind));
  return ZONES.map(
    (zone, index) => `${profileFor(made[zone], kind)?.id ?? ''}:${looks.indexOf(looks[index] ?? '')}`,
  ).join(',');
}

function groupsOf(
  faces: readonly Face[],
  walls: readonly Wall[],
  made: MadeByZone,
  kind: MouldingKind,
  panel: number,
): Group[] {
  const groups: Group[] = [];
  for (const wall of walls) {
    const here = faces
      .filter((face) => face.wall === wall && takes(face, kind) && profileFor(made[face.cabinet.zone], kind))
      .sort((a, b) => a.at - b.at);
    let current: Face[] = [];
    const close = () => {
      const first = current[0];
      const last = current[current.length - 1];
      const profile = first && profileFor(made[first.cabinet.zone], kind);
      if (first && last && profile)
        groups.push({
          wall,
          faces: current,
          profile,
          look: lookOf(made[first.cabinet.zone], kind),
          level: levelOf(first, kind),
          from: first.at - sideExtent(first, 'left', panel),
          to: endOf(last) + sideExtent(last, 'right', panel),
        });
      current = [];
    };
    for (const face of here) {
      const last = current[current.length - 1];
      const joins =
        last !== undefined &&
        touches(last, face) &&
        Math.abs(levelOf(last, kind) - levelOf(face, kind)) <= LEVEL &&
        lookOf(made[last.cabinet.zone], kind) === lookOf(made[face.cabinet.zone], kind);
      if (!joins) close();
      current.push(face);
    }
    close();
  }
  return groups;
}

/** Whether the right side of one face meets the left side of another: frames, a filler, or a panel between. */
function touches(left: Face, right: Face): boolean {
  const a = left.right;
  const b = right.left;
  if (a.kind === 'face' && a.face === right.index) return true;
  if (b.kind === 'face' && b.face === left.index) return true;
  const gap = right.at - endOf(left);
  return gap >= -LEVEL && gap <= 16;
}

/** How far the moulding reaches past a frame: an end panel's thickness or a filler. */
function sideExtent(face: Face, side: 'left' | 'right', panel: number): number {
  const beside = face[side];
  if (beside.kind === 'exposed') return panel;
  if (beside.kind === 'other') return beside.filler?.width ?? 0;
  return 0;
}

type Join = { readonly group: Group; readonly atHere: number; readonly atThere: number };

/** The group that goes on round an inside corner at this group's right end. */
function nextOf(groups: readonly Group[], group: Group): Join | null {
  const last = group.faces[group.faces.length - 1];
  if (!last) return null;
  for (const other of groups) {
    const first = other.faces[0];
    if (!first || other.wall === group.wall || other.look !== group.look) continue;
    if (Math.abs(other.level - group.level) > LEVEL) continue;
    const cross = crossing(group.wall, last.cabinet.depth, other.wall, first.cabinet.depth);
    if (!cross) continue;
    const a = outward(group.wall);
    const b = outward(other.wall);
    // A right turn, seen from above: the room lies in the angle.
    if (a.x * b.y - a.y * b.x >= 0) continue;
    const here = group.to - cross.atA;
    const there = cross.atB - other.from;
    if (
      here >= -LEVEL &&
      here <= first.cabinet.depth + 64 &&
      there >= -LEVEL &&
      there <= last.cabinet.depth + 64
    )
      return { group: other, atHere: cross.atA, atThere: cross.atB };
  }
  return null;
}

/** Lines of one kind of moulding round the kitchen (C2). */
function linesOf(
  faces: readonly Face[],
  walls: readonly Wall[],
  made: MadeByZone,
  kind: MouldingKind,
  panel: number,
): MouldingLine[] {
  const groups = groupsOf(faces, walls, made, kind, panel);
  const next = new Map(groups.map((group) => [group, nextOf(groups, group)] as const));
  const followed = new Set([...next.values()].flatMap((join) => (join ? [join.group] : [])));
  const lines: MouldingLine[] = [];
  const done = new Set<Group>();
  const starts = [...groups.filter((group) => !followed.has(group)), ...groups];
  for (const start of starts) {
    if (done.has(start)) continue;
    const stretches: Stretch[] = [];
    const lineFaces: Face[] = [];
    let group: Group | null = start;
    let from: number | null = null;
    while (group && !done.has(group)) {
      done.add(group);
      const join: Join | null = next.get(group) ?? null;
      const on: Join | null = join && !done.has(join.group) ? join : null;
      stretches.push(...stretchesOf(group, from, on?.atHere ?? null, kind, panel));
      lineFaces.push(...group.faces);
      from = on?.atThere ?? null;
      group = on?.group ?? null;
    }
    const path: PlanPoint[] = [];
    for (const { from: a, to: b } of stretches) {
      const last = path[path.length - 1];
      if (!last || Math.hypot(last.x - a.x, last.y - a.y) > 1) path.push(a);
      path.push(b);
    }
    const first = path[0];
    const end = path[path.length - 1];
    const closed = path.length > 3 && first?.x === end?.x && first?.y === end?.y;
    const zone = start.faces[0]?.cabinet.zone;
    if (zone && path.length > 1)
      lines.push({
        kind,
        profile: start.profile,
        zone,
        faces: lineFaces,
        stretches,
        path,
        closed,
        level: start.level,
      });
  }
  return lines;
}

/** The stretches of one group; `from` and `to` are places of inside corners, `null` at its own ends. */
function stretchesOf(
  group: Group,
  from: number | null,
  to: number | null,
  kind: MouldingKind,
  panel: number,
): Stretch[] {
  const { wall, faces } = group;
  const first = faces[0];
  const last = faces[faces.length - 1];
  if (!first || !last) return [];
  const stretches: Stretch[] = [];
  const add = (face: Face, role: Stretch['role'], a: [number, number], b: [number, number]) => {
    if (a[0] === b[0] && a[1] === b[1]) return;
    stretches.push({ wall, face, role, from: pointOn(wall, ...a), to: pointOn(wall, ...b) });
  };
  const wraps =
    kind === 'base' && wall.kind === 'freestanding' && faces.every((face) => face.cabinet.backExposed);
  const leftExposed = from === null && first.left.kind === 'exposed';
  const rightExposed = to === null && last.right.kind === 'exposed';
  const backOut = wraps ? -panel : 0;

  let x = from ?? group.from;
  if (leftExposed) add(first, 'return', [x, backOut], [x, first.cabinet.depth]);
  let begun = x;
  let straight = first;
  faces.forEach((face, index) => {
    const before = faces[index - 1];
    if (!before || before.cabinet.depth === face.cabinet.depth) return;
    const deeper = face.cabinet.depth > before.cabinet.depth;
    x = deeper
      ? face.at - (face.left.kind === 'exposed' ? panel : 0)
      : endOf(before) + (before.right.kind === 'exposed' ? panel : 0);
    add(straight, 'run', [begun, before.cabinet.depth], [x, before.cabinet.depth]);
    add(deeper ? face : before, 'step', [x, before.cabinet.depth], [x, face.cabinet.depth]);
    begun = x;
    straight = face;
  });
  x = to ?? group.to;
  add(straight, 'run', [begun, last.cabinet.depth], [x, last.cabinet.depth]);
  if (rightExposed) add(last, 'return', [x, last.cabinet.depth], [x, backOut]);
  if (wraps && rightExposed) {
    const start = leftExposed ? group.from : backFrom(group);
    add(last, 'back', [x, backOut], [start, backOut]);
  }
  return stretches;
}

/** Where the back of a group begins: a corner cabinet's back reaches to the wall it leaves. */
const backFrom = (group: Group): number => (group.faces[0]?.left.kind === 'innerCorner' ? 0 : group.from);

/** Everything about one kind of moulding (C2, C3's nailers). `measures` tell where the crown stands on a nailer. */
export function measureMoulding(
  faces: readonly Face[],
  measures: readonly FaceMeasure[],
  walls: readonly Wall[],
  made: MadeByZone,
  edition: Edition,
  kind: MouldingKind,
): MouldingMeasure {
  const lines = linesOf(faces, walls, made, kind, edition.shop.panelThickness);
  const pieces: PieceMeasure[] = [];
  const length: Record<Zone, number> = { wall: 0, base: 0, island: 0, tall: 0 };
  const nailer: Record<Zone, number> = { wall: 0, base: 0, island: 0, tall: 0 };
  const counts = new Map<string, number>();
  const mark = (wall: Wall, role: Stretch['role']): string => {
    const letters = kind === 'crown' ? 'CR' : kind === 'base' ? 'BM' : 'LR';
    const suffix = role === 'run' ? '' : role === 'return' ? 'E' : role === 'step' ? 'S' : 'B';
    const name = `${wall.id}-${letters}${suffix}`;
    const count = (counts.get(name) ?? 0) + 1;
    counts.set(name, count);
    return `${name}${count}`;
  };

  for (const line of lines) {
    const { profile, stretches } = line;
    const projection = projectionOf(profile);
    const spring = kind === 'crown' ? profile.spring : 0;
    stretches.forEach((stretch, index) => {
      const before = stretches[index - 1] ?? (line.closed ? stretches[stretches.length - 1] : undefined);
      const after = stretches[index + 1] ?? (line.closed ? stretches[0] : undefined);
      const left = vertex(before, stretch);
      const right = vertex(stretch, after);
      const back = Math.hypot(stretch.to.x - stretch.from.x, stretch.to.y - stretch.from.y);
      const front =
        back + edgeGain(left.kind, projection, left.corner) + edgeGain(right.kind, projection, right.corner);
      const { zone } = stretch.face.cabinet;
      const name = mark(stretch.wall, stretch.role);
      const piece: PieceMeasure = {
        mark: name,
        kind,
        profile: profile.id,
        zone,
        backLength: sixtyfourths(Math.round(back)),
        frontLength: sixtyfourths(Math.max(0, Math.round(front))),
        left: mouldingEnd(left.kind, spring, left.corner),
        right: mouldingEnd(right.kind, spring, right.corner),
        isReturn: stretch.role === 'return',
      };
      pieces.push(piece);
      length[zone] += Math.max(piece.backLength, piece.frontLength);
      if (kind !== 'crown' || !measures[stretch.face.index]?.crown?.nailer) return;
      const square = mouldingEnd('stopped', spring);
      pieces.push({
        ...piece,
        mark: `${name}-N`,
        kind: 'nailer',
        frontLength: piece.backLength,
        left: square,
        right: square,
      });
      nailer[zone] += piece.backLength;
    });
  }
  return { lines, pieces, length, nailer };
}

interface Vertex {
  readonly kind: MouldingEnd['kind'];
  /** Between the two faces that the moulding is fixed to, in degrees (C1). */
  readonly corner: number;
}

/** How two stretches meet: a right turn is an inside corner, a left turn an outside one. */
function vertex(a: Stretch | undefined, b: Stretch | undefined): Vertex {
  if (!a || !b) return { kind: 'stopped', corner: 180 };
  const ax = a.to.x - a.from.x;
  const ay = a.to.y - a.from.y;
  const bx = b.to.x - b.from.x;
  const by = b.to.y - b.from.y;
  const turn = Math.abs((Math.atan2(ax * by - ay * bx, ax * bx + ay * by) * 180) / Math.PI);
  if (turn < 0.5) return { kind: 'stopped', corner: 180 };
  return { kind: ax * by - ay * bx < 0 ? 'inside' : 'outside', corner: 180 - turn };
}
