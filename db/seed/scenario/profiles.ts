import { inches, sixtyfourths } from '@/lib/engine/length';
import type { MouldingProfile, ProfilePoint } from '@/lib/engine/edition-types';
import type { Cents } from '@/lib/engine/types';

const point = (x: number, y: number): ProfilePoint => ({
  x: sixtyfourths(Math.round(x)),
  y: sixtyfourths(Math.round(y)),
});

/** Points of a section, in 1/64 inch. */
export const section = (...points: readonly (readonly [number, number])[]): ProfilePoint[] =>
  points.map(([x, y]) => point(x, y));

type Front = 'cove' | 'stepped' | 'ogee';

/** The face of a crown between its foot and its head, as shares of projection and drop. */
const FACES: Readonly<Record<Front, readonly (readonly [number, number])[]>> = {
  cove: [
    [0.06, 0.12],
    [0.1, 0.12],
    [0.12, 0.3],
    [0.18, 0.47],
    [0.29, 0.62],
    [0.44, 0.74],
    [0.62, 0.82],
    [0.8, 0.86],
    [0.8, 0.9],
    [1, 0.9],
  ],
  stepped: [
    [0.08, 0.1],
    [0.2, 0.1],
    [0.2, 0.32],
    [0.42, 0.32],
    [0.42, 0.58],
    [0.68, 0.58],
    [0.68, 0.84],
    [1, 0.84],
  ],
  ogee: [
    [0.07, 0.1],
    [0.16, 0.12],
    [0.27, 0.19],
    [0.33, 0.29],
    [0.36, 0.42],
    [0.42, 0.56],
    [0.54, 0.68],
    [0.7, 0.76],
    [0.86, 0.8],
    [0.86, 0.86],
    [1, 0.88],
  ],
};

/** A sprung crown of a flat face width, whose section is drawn from its own reach. */
export function crown(
  id: string,
  name: string,
  front: Front,
  faceInches: number,
  price: number,
): MouldingProfile {
  const spring = (38 * Math.PI) / 180;
  const face = faceInches * 64;
  const drop = face * Math.cos(spring);
  const projection = face * Math.sin(spring);
  const body = FACES[front].map(([x, y]) => point(x * projection, y * drop));
  return {
    id,
    name,
    kind: 'crown',
    section: [
      point(0, 0),
      point(projection * 0.06, 0),
      ...body,
      point(projection, drop),
      point(projection - 12, drop),
      point(0, 14),
    ],
    face: inches(faceInches),
    spring: 38_000,
    height: sixtyfourths(Math.ceil(drop)),
    projection: sixtyfourths(Math.round(projection)),
    price: price as Cents,
  };
}

/** A base moulding that stands against the frame's face. */
export function baseMoulding(
  id: string,
  name: string,
  heightInches: number,
  form: 'square' | 'ogee',
  price: number,
): MouldingProfile {
  const h = heightInches * 64;
  const t = 40;
  const head: readonly (readonly [number, number])[] =
    form === 'square'
      ? [
          [t, h - 5],
          [t - 5, h],
        ]
      : [
          [t, h - 44],
          [t - 6, h - 40],
          [t - 8, h - 28],
          [t - 16, h - 16],
          [t - 24, h - 8],
          [t - 24, h],
        ];
  return {
    id,
    name,
    kind: 'base',
    section: section([0, 0], [t, 0], ...head, [0, h]),
    face: inches(heightInches),
    spring: 0,
    height: inches(heightInches),
    projection: sixtyfourths(t),
    price: price as Cents,
  };
}

/** A light rail under the front edge of wall cabinets. */
export function lightRail(id: string, name: string, heightInches: number, price: number): MouldingProfile {
  const h = heightInches * 64;
  return {
    id,
    name,
    kind: 'lightRail',
    section: section([0, 0], [24, 0], [34, 8], [38, 20], [38, h - 26], [46, h - 18], [46, h], [0, h]),
    face: inches(heightInches),
    spring: 0,
    height: inches(heightInches),
    projection: sixtyfourths(46),
    price: price as Cents,
  };
}
