import { z } from 'zod';
import type { FrameLayout, Survey } from '@/lib/engine/types';
import { faultsOf } from './faults';
import { dateShape, lengthShape, positiveShape, readLengths, sizeShape } from './lengths';

const wallId = z.string().regex(/^[A-Z][A-Z0-9]{0,3}$/, 'A wall is named by capitals, such as N.');
const cabinetId = z
  .string()
  .regex(/^[A-Z][A-Z0-9]{0,3}-\d{2,3}$/, 'A cabinet is named wall and number, such as N-03.');
const thingId = z.string().min(1).max(24);
const point = z.strictObject({ x: lengthShape, y: lengthShape });
const tier = z.enum(['base', 'wall', 'tall']);

const opening = z.strictObject({
  n: z.number().int().min(1).max(99),
  kind: z.enum(['door', 'pair', 'drawer', 'falseFront', 'tiltOut', 'appliancePanel', 'open', 'cornerFold']),
  width: positiveShape,
  widthSecond: positiveShape.optional(),
  height: positiveShape,
  hinge: z.enum(['left', 'right']).optional(),
  glass: z.boolean().optional(),
  applianceSize: z.strictObject({ width: positiveShape, height: positiveShape }).optional(),
  existing: z.array(z.strictObject({ width: positiveShape, height: positiveShape })).max(4),
});

const layout: z.ZodType<FrameLayout> = z.lazy(() =>
  z.union([
    z.strictObject({ opening }),
    z.strictObject({
      split: z.enum(['row', 'column']),
      parts: z.array(layout).min(2, 'A split has at least two parts.').max(12),
      members: z.array(sizeShape),
    }),
  ]),
);

const frame = z.strictObject({
  stileLeft: sizeShape,
  stileRight: sizeShape,
  railTop: sizeShape,
  railBottom: sizeShape,
  thickness: positiveShape,
  layout,
});

const cabinet = z.strictObject({
  id: cabinetId,
  wall: wallId,
  zone: z.enum(['wall', 'base', 'island', 'tall']),
  tier,
  at: sizeShape,
  width: positiveShape,
  height: positiveShape,
  bottom: sizeShape,
  depth: positiveShape,
  frame,
  left: z.strictObject({ exposed: z.boolean() }),
  right: z.strictObject({ exposed: z.boolean() }),
  backExposed: z.boolean().optional(),
  toe: z.strictObject({ height: positiveShape, depth: sizeShape }).optional(),
  box: z.literal('faceFrame', { error: 'Frameless boxes are not refaced here: the box needs a face frame.' }),
  action: z.enum(['reface', 'replace', 'remove', 'add', 'keep']),
  material: z.enum(['wood', 'laminate', 'thermofoil', 'paint']),
  bondTest: z.enum(['passed', 'failed', 'notDone']),
  condition: z.enum(['sound', 'damagedFloor', 'damagedFrame']),
  coated: z.boolean(),
  corner: z
    .strictObject({ otherWall: wallId, legA: positiveShape, legB: positiveShape, frameB: frame })
    .optional(),
  joinedRight: z.boolean().optional(),
  outOfPlane: lengthShape.optional(),
  overhang: sizeShape.optional(),
  underLight: z.strictObject({ height: positiveShape, lip: sizeShape }).optional(),
});

const APPLIANCES = [
  'range',
  'cooktop',
  'refrigerator',
  'dishwasher',
  'sink',
  'hood',
  'microwave',
  'wallOven',
] as const;

const body = z.strictObject({
  version: z.literal(1, { error: 'This version of a survey is not known here.' }),
  kitchen: z.string().min(1).max(120),
  measuredOn: dateShape,
  yearBuilt: z.number().int().min(1600).max(2100).nullable(),
  room: z.strictObject({
    outline: z.array(point).min(3, 'A room has at least three corners.').max(40),
    ceiling: positiveShape,
    soffits: z
      .array(
        z.strictObject({
          wall: wallId,
          at: sizeShape,
          width: positiveShape,
          depth: positiveShape,
          bottom: sizeShape,
        }),
      )
      .max(20),
  }),
  walls: z
    .array(
      z.strictObject({
        id: wallId,
        name: z.string().min(1).max(60),
        kind: z.enum(['wall', 'freestanding']),
        from: point,
        to: point,
      }),
    )
    .min(1, 'A survey has at least one wall.')
    .max(24),
  cabinets: z.array(cabinet).max(400),
  fillers: z
    .array(
      z.strictObject({
        id: thingId,
        wall: wallId,
        tier,
        at: sizeShape,
        width: positiveShape,
        bottom: sizeShape,
        height: positiveShape,
      }),
    )
    .max(100),
  appliances: z
    .array(
      z.strictObject({
        id: thingId,
        kind: z.enum(APPLIANCES),
        wall: wallId,
        at: sizeShape,
        width: positiveShape,
        bottom: sizeShape,
        height: positiveShape,
        depth: positiveShape,
        within: cabinetId.optional(),
        handle: sizeShape.optional(),
        toeDoor: sizeShape.optional(),
      }),
    )
    .max(40),
  gaps: z
    .array(
      z.strictObject({
        id: thingId,
        kind: z.enum(['window', 'doorway']),
        wall: wallId,
        at: sizeShape,
        width: positiveShape,
        bottom: sizeShape,
        height: positiveShape,
        casing: sizeShape,
      }),
    )
    .max(40),
  typed: z.record(z.string(), z.string().max(40)).default({}),
});

export interface PathFault {
  readonly path: readonly (string | number)[];
  readonly message: string;
}

type Loose = Readonly<Record<string, unknown>>;
const object = (value: unknown): Loose =>
  typeof value === 'object' && value !== null && !Array.isArray(value) ? { ...value } : {};
const list = (value: unknown): readonly unknown[] => (Array.isArray(value) ? value : []);

/**
 * What points to nothing, or stands twice. Reads whatever it is given, so that these faults are told together with
 * those of the shape.
 */
function crossFaults(json: unknown): PathFault[] {
  const faults: PathFault[] = [];
  const survey = object(json);
  const ids = (name: string) => list(survey[name]).map((one) => object(one).id);
  const walls = new Set(ids('walls'));
  const cabinets = new Set(ids('cabinets'));
  const tell = (message: string, ...path: (string | number)[]) => faults.push({ path, message });

  for (const name of ['walls', 'cabinets', 'fillers', 'appliances', 'gaps']) {
    const seen = new Set<unknown>();
    ids(name).forEach((id, index) => {
      if (typeof id !== 'string') return;
      if (seen.has(id)) tell(`${id} stands here twice.`, name, index, 'id');
      seen.add(id);
    });
  }
  const needsWall = (value: unknown, ...path: (string | number)[]) => {
    if (typeof value === 'string' && !walls.has(value)) tell(`There is no wall ${value}.`, ...path);
  };
  for (const name of ['cabinets', 'fillers', 'appliances', 'gaps'])
    list(survey[name]).forEach((one, index) => needsWall(object(one).wall, name, index, 'wall'));
  list(object(survey.room).soffits).forEach((one, index) =>
    needsWall(object(one).wall, 'room', 'soffits', index, 'wall'),
  );
  list(survey.appliances).forEach((one, index) => {
    const { within } = object(one);
    if (typeof within === 'string' && !cabinets.has(within))
      tell(`There is no cabinet ${within}.`, 'appliances', index, 'within');
  });
  list(survey.walls).forEach((one, index) => {
    const { from, to } = object(one);
    const a = object(from);
    const b = object(to);
    if (typeof a.x === 'number' && a.x === b.x && a.y === b.y)
      tell('A wall needs a length.', 'walls', index, 'to');
  });

  list(survey.cabinets).forEach((value, index) => {
    const one = object(value);
    const { id, wall, corner } = one;
    if (typeof id === 'string' && typeof wall === 'string' && id.includes('-') && !id.startsWith(`${wall}-`))
      tell(`${id} does not begin with its wall, ${wall}.`, 'cabinets', index, 'id');
    const seen = new Map<unknown, unknown>();
    layoutFaults(object(one.frame).layout, ['cabinets', index, 'frame', 'layout'], seen, faults);
    if (corner === undefined) return;
    const { otherWall, frameB } = object(corner);
    const here = ['cabinets', index, 'corner'] as const;
    needsWall(otherWall, ...here, 'otherWall');
    if (otherWall === wall) tell('A corner stands between two walls.', ...here, 'otherWall');
    const folds = new Map([...seen].filter(([, kind]) => kind === 'cornerFold'));
    const seenB = new Map<unknown, unknown>();
    layoutFaults(object(frameB).layout, [...here, 'frameB', 'layout'], seenB, faults);
    for (const [n, kind] of seenB) {
      const folded = kind === 'cornerFold' && folds.has(n);
      if (!folded && seen.has(n))
        tell(`Opening ${String(n)} stands twice in this cabinet.`, ...here, 'frameB', 'layout');
      if (kind === 'cornerFold' && !folds.has(n))
        tell(
          `The other leaf of opening ${String(n)} is missing on the first leg.`,
          ...here,
          'frameB',
          'layout',
        );
    }
    for (const n of folds.keys()) {
      if (seenB.get(n) !== 'cornerFold')
        tell(
          `The other leaf of opening ${String(n)} is missing on the second leg.`,
          ...here,
          'frameB',
          'layout',
        );
    }
  });
  list(survey.cabinets).forEach((value, index) => {
    const one = object(value);
    if (one.corner !== undefined) return;
    const seen = new Map<unknown, unknown>();
    layoutFaults(object(one.frame).layout, [], seen, []);
    for (const [n, kind] of seen) {
      if (kind === 'cornerFold')
        tell(
          `Opening ${String(n)} folds round a corner, but the cabinet has none.`,
          'cabinets',
          index,
          'frame',
        );
    }
  });
  return faults;
}

/** Faults of a layout; `seen` gets each opening's number and kind. */
function layoutFaults(
  value: unknown,
  path: readonly (string | number)[],
  seen: Map<unknown, unknown>,
  faults: PathFault[],
): void {
  const one = object(value);
  if (one.opening !== undefined) {
    const { n, kind } = object(one.opening);
    if (seen.has(n)) {
      const message = `Opening ${String(n)} stands twice in this cabinet.`;
      faults.push({ path: [...path, 'opening', 'n'], message });
    }
    seen.set(n, kind);
    return;
  }
  const parts = list(one.parts);
  const members = list(one.members);
  if (one.parts !== undefined && members.length !== parts.length - 1) {
    const needed = parts.length - 1;
    const message = `${parts.length} parts have ${needed} ${needed === 1 ? 'member' : 'members'} between them, not ${members.length}.`;
    faults.push({ path: [...path, 'members'], message });
  }
  parts.forEach((part, index) => layoutFaults(part, [...path, 'parts', index], seen, faults));
}

/**
 * A survey from outside. Lengths may be typed text (`24 1/2`), read by D2 and kept in `typed`. What does not close
 * (S1, S2) is no fault of the shape: the computation notes it.
 */
export const surveyShape: z.ZodType<Survey> = z.unknown().transform((json, context): Survey => {
  const typed: Record<string, string> = {};
  const read = readLengths(json, typed);
  const parsed = body.safeParse(read);
  for (const { path, message } of parsed.error?.issues.flatMap(flatten) ?? [])
    context.addIssue({ code: 'custom', path: [...path], message });
  const crossed = crossFaults(read);
  for (const { path, message } of crossed) context.addIssue({ code: 'custom', path: [...path], message });
  if (!parsed.success || crossed.length > 0) return z.NEVER;
  return { ...parsed.data, typed: { ...parsed.data.typed, ...typed } };
});

/** Of a union, the faults of the branch that came nearest. */
function flatten(issue: z.core.$ZodIssue): { path: PropertyKey[]; message: string }[] {
  if (issue.code !== 'invalid_union' || issue.errors.length === 0)
    return [{ path: issue.path, message: issue.message }];
  // The branch whose faults lie deepest is the one that was meant.
  const depth = (branch: z.core.$ZodIssue[]) => Math.max(0, ...branch.map((one) => one.path.length));
  const unknownKeys = (branch: z.core.$ZodIssue[]) =>
    branch.filter((one) => one.code === 'unrecognized_keys').length;
  const [nearest = []] = [...issue.errors].sort(
    (a, b) => unknownKeys(a) - unknownKeys(b) || depth(b) - depth(a),
  );
  return nearest.flatMap(flatten).map(({ path, message }) => ({ path: [...issue.path, ...path], message }));
}

export type ParsedSurvey =
  | { readonly ok: true; readonly value: Survey }
  | { readonly ok: false; readonly faults: readonly { readonly path: string; readonly message: string }[] };

/** Reads a survey; every fault by path, such as `cabinets.3.width`. Never throws. */
export function parseSurvey(json: unknown): ParsedSurvey {
  const parsed = surveyShape.safeParse(json);
  return parsed.success ? { ok: true, value: parsed.data } : { ok: false, faults: faultsOf(parsed.error) };
}
