import { describe, expect, it } from 'vitest';
import {
  base,
  frame,
  opening,
  row,
  tall,
  upper,
  wall,
  at,
  cornerFrames,
  appliance,
} from '@/db/seed/scenario/build';
import { baseFiller, crownFit, crownReach, sawSettings, valanceHeight } from '@/lib/engine/crown';
import { formatLength, inches, sixtyfourths } from '@/lib/engine/length';
import { massing } from '@/lib/engine/massing';
import { takeoff } from '@/lib/engine/takeoff';
import { CHOICES, choose, EDITION, oneDoor, survey, TERMS } from './scene';

const degrees = (value: number) => (value * 180) / Math.PI;
const radians = (value: number) => (value * Math.PI) / 180;

describe('C1 saw settings of a crown laid flat', () => {
  // 90 at S 38: two saw makers' manuals, ±0.05. 135 at S 38: a published worked example. The rest computed.
  it.each([
    [38, 90, 31.62, 33.86],
    [45, 90, 35.26, 30.0],
    [38, 135, 14.31, 17.55],
    [45, 135, 16.32, 15.7],
    [38, 88, 32.52, 34.53],
    [38, 92, 30.73, 33.19],
    [45, 88, 36.21, 30.57],
    [45, 92, 34.33, 29.42],
    [38, 120, 19.57, 23.2],
    [45, 120, 22.21, 20.7],
  ])('C1 spring %s, corner %s: miter %s, bevel %s', (spring, corner, miter, bevel) => {
    const found = sawSettings(spring, corner);
    expect(found.miter).toBeCloseTo(miter, 1);
    expect(Math.abs(found.miter - miter)).toBeLessThan(0.006);
    expect(Math.abs(found.bevel - bevel)).toBeLessThan(0.006);
  });
  it('C1 bevel = atan(sin miter / tan S) and miter = acos(sin(C/2) / cos bevel), at every angle', () => {
    for (let corner = 60; corner < 180; corner += 7)
      for (const spring of [30, 38, 45, 52]) {
        const { miter, bevel } = sawSettings(spring, corner);
        const s = radians(spring);
        expect(degrees(Math.atan(Math.sin(radians(miter)) / Math.tan(s)))).toBeCloseTo(bevel, 8);
        expect(degrees(Math.acos(Math.sin(radians(corner / 2)) / Math.cos(radians(bevel))))).toBeCloseTo(
          miter,
          6,
        );
      }
  });
  it('C1 a face of 3 1/4 at 38° projects 2.001 and drops 2.561', () => {
    const { drop, projection } = crownReach({ face: inches(3.25), spring: 38_000 });
    expect(projection / 64).toBeCloseTo(2.001, 3);
    expect(drop / 64).toBeCloseTo(2.561, 3);
  });
});

describe('C3 the crown clearance rule', () => {
  const crown = { face: inches(3.25), spring: 38_000 };
  const shop = { crownClearance: inches(0.125) };
  it('C3 top rail 2, overlay 1/2, tight to the ceiling: the strip is 1 3/16', () => {
    // The rule's own example: free flat 1 1/2, 2 9/16 + 1/8 − 1 1/2.
    const fit = crownFit(shop, crown, 0, inches(2), inches(0.5), true);
    expect(formatLength(sixtyfourths(fit.drop))).toBe('2 9/16');
    expect(formatLength(fit.filler)).toBe('1 3/16');
    expect(fit.nailer).toBe(false);
  });
  it('C3 with room for its drop it stands on a nailer and nothing is filled', () => {
    expect(crownFit(shop, crown, inches(2.5625), inches(2), inches(0.5), true)).toMatchObject({
      nailer: true,
      filler: 0,
      seat: 0,
    });
  });
  it('C3 a wide rail needs no strip', () => {
    expect(crownFit(shop, crown, 0, inches(4), inches(0.5), true)).toMatchObject({
      nailer: false,
      filler: 0,
    });
  });
  it('C3 an open shelf needs no clearance and has no overlay', () => {
    // 2 9/16 − 2 = 9/16.
    expect(formatLength(crownFit(shop, crown, 0, inches(2), inches(0.5), false).filler)).toBe('9/16');
  });

  const tight = (top: number) =>
    survey([
      upper(
        'N-01',
        { at: 24, width: 36, bottom: 54, height: 42 },
        frame(
          row(
            3,
            opening(1, 'door', 15, 42 - top - 1.5, { hinge: 'left' }),
            opening(2, 'door', 15, 42 - top - 1.5, { hinge: 'right' }),
          ),
          { top },
        ),
      ),
    ]);
  it('C3 a taller crown makes doors shorter, dearer and noted', () => {
    const of = (crownId: string) => takeoff(tight(2), EDITION, choose({ crown: crownId }), TERMS);
    const none = of('none');
    const low = of('cove-3-1-4');
    const high = of('stepped-4-1-4');
    const heights = (taken: typeof none) => taken.fronts.map((front) => formatLength(front.height));
    expect(heights(none)).toEqual(['39 1/2', '39 1/2']);
    expect(heights(low)).toEqual(['38 5/16', '38 5/16']);
    // 4 1/4 at 38°: drop 3.349 → 3 23/64; + 1/8 − 1 1/2 = 1 63/64, up to 1/16: 2.
    expect(heights(high)).toEqual(['37 1/2', '37 1/2']);
    expect(
      low.fillers.map((strip) => [strip.mark, formatLength(strip.height), formatLength(strip.width)]),
    ).toEqual([
      ['N-01-1-F', '1 3/16', '15'],
      ['N-01-2-F', '1 3/16', '15'],
    ]);
    const note = low.notes.find((one) => one.code === 'crown.filler');
    const strip = EDITION.labour.find((rate) => rate.per === 'fillerStrip');
    expect(note).toMatchObject({ severity: 'addsWork', amount: 2 * (strip?.price ?? 0) });
    expect(high.total).toBeGreaterThan(low.total);
    expect(note?.wayOut?.delta).toBe(none.total - low.total);
  });
  it('C3 the rail and its filler are one strip of veneer', () => {
    const { veneer } = takeoff(tight(2), EDITION, choose({ crown: 'cove-3-1-4' }), TERMS);
    const strip = veneer.find((one) => one.mark === 'N-01-RT');
    // 2 + 1 3/16 + 2 × 1/8 = 3 7/16, up to 1/8: 3 1/2.
    expect(strip && [strip.member, formatLength(strip.width), formatLength(strip.length)]).toEqual([
      'filler',
      '3 1/2',
      '33',
    ]);
  });
  it('C3 a pair without a mullion has one strip', () => {
    const pair = survey([
      upper(
        'N-01',
        { at: 24, width: 36, bottom: 54, height: 42 },
        frame(opening(1, 'pair', 33, 38.5), { top: 2 }),
      ),
    ]);
    expect(takeoff(pair, EDITION, choose({ crown: 'cove-3-1-4' }), TERMS).fillers).toHaveLength(1);
  });
  it('C3 below the style’s smallest height it cannot be built so, and the option says so', () => {
    const low = survey([
      upper(
        'N-01',
        { at: 24, width: 36, bottom: 89, height: 7 },
        frame(opening(1, 'pair', 33, 3.5), { top: 2 }),
      ),
    ]);
    const { notes } = takeoff(low, EDITION, choose({ crown: 'stepped-4-1-4' }), TERMS);
    expect(notes.find((note) => note.code === 'front.low')).toMatchObject({ severity: 'cannotBeBuilt' });
  });
});

describe('C2 runs, corners and returns', () => {
  const crowned = choose({ crown: 'cove-3-1-4' });
  const low = (id: string, place: number, width: number, more: Parameters<typeof upper>[3] = {}) =>
    upper(id, { at: place, width, bottom: 54, height: 30 }, frame(opening(1, 'pair', width - 3, 27)), more);
  it('C2 both ends exposed: widths and panels, both edges longer by the projection, returns as long as the cabinet is deep', () => {
    const taken = takeoff(
      survey([
        low('N-01', 24, 30, { left: { exposed: true } }),
        low('N-02', 54, 24, { right: { exposed: true } }),
      ]),
      EDITION,
      crowned,
      TERMS,
    );
    const pieces = taken.mouldings.filter((piece) => piece.kind === 'crown');
    // 30 + 24 + 2 × 1/4 = 54 1/2; the front is longer by 2 × 2.001.
    expect(
      pieces.map((piece) => [piece.mark, formatLength(piece.backLength), formatLength(piece.frontLength)]),
    ).toEqual([
      ['N-CRE1', '12', '14'],
      ['N-CR1', '54 1/2', '58 1/2'],
      ['N-CRE2', '12', '14'],
    ]);
    expect(pieces[1]).toMatchObject({
      left: { kind: 'outside', miter: 31_619, bevel: 33_863, longEdge: 'front' },
      right: { kind: 'outside' },
    });
    expect(pieces[0]).toMatchObject({ isReturn: true, left: { kind: 'stopped', miter: 0, bevel: 0 } });
    // A foot of room above: nailers.
    expect(taken.mouldings.filter((piece) => piece.kind === 'nailer')).toHaveLength(3);
  });
  it('C2 a step in depth makes an inside corner, a side piece as long as the step, and an outside corner', () => {
    const { mouldings } = takeoff(
      survey([
        low('N-01', 24, 30),
        tall('N-02', { at: 54.25, width: 24, height: 80 }, frame(opening(1, 'pair', 21, 77)), {
          left: { exposed: true },
        }),
      ]),
      EDITION,
      crowned,
      TERMS,
    );
    const pieces = mouldings.filter((piece) => piece.kind === 'crown');
    expect(
      pieces.map((piece) => [piece.mark, formatLength(piece.backLength), piece.left.kind, piece.right.kind]),
    ).toEqual([
      ['N-CR1', '30', 'stopped', 'inside'],
      ['N-CRS1', '12', 'inside', 'outside'],
      ['N-CR2', '24 1/4', 'outside', 'stopped'],
    ]);
    expect(pieces[0]?.right.longEdge).toBe('back');
  });
  it('C2 tops that differ by more than 1/16 in are two runs', () => {
    const { mouldings } = takeoff(
      survey([
        low('N-01', 24, 30),
        upper('N-02', { at: 54, width: 24, bottom: 54, height: 31 }, frame(opening(1, 'pair', 21, 28))),
      ]),
      EDITION,
      crowned,
      TERMS,
    );
    expect(mouldings.filter((piece) => piece.kind === 'crown').map((piece) => piece.mark)).toEqual([
      'N-CR1',
      'N-CR2',
    ]);
  });
  it('C2 round an inside corner one run goes on, measured from the corner of the fronts', () => {
    const room = survey(
      [
        upper('W-01', { at: 60, width: 60, bottom: 54, height: 30 }, frame(opening(1, 'pair', 57, 27))),
        upper(
          'W-02',
          { at: 120, width: 24, bottom: 54, height: 30 },
          frame(opening(1, 'cornerFold', 10.5, 27)),
          {
            ...cornerFrames({ legA: 24, legB: 24, otherWall: 'N', height: 30, depth: 12, hung: 'left' }),
          },
        ),
        low('N-01', 24, 30),
      ],
      {
        walls: [
          wall('W', 'West wall', at(0, 0), at(0, 144)),
          wall('N', 'North wall', at(0, 144), at(240, 144)),
        ],
      },
    );
    const { mouldings } = takeoff(room, EDITION, crowned, TERMS);
    const pieces = mouldings.filter((piece) => piece.kind === 'crown');
    // West: 60 + 12 of the leg; north: 12 of the leg + 30. Inside: shorter by 2.001 in front.
    expect(
      pieces.map((piece) => [piece.mark, formatLength(piece.backLength), formatLength(piece.frontLength)]),
    ).toEqual([
      ['W-CR1', '72', '70'],
      ['N-CR1', '42', '40'],
    ]);
    const [sweep] = massing(room, EDITION, crowned).sweeps;
    expect(sweep?.path.map((point) => [point.x / 64, point.y / 64])).toEqual([
      [12, 60],
      [12, 132],
      [54, 132],
    ]);
  });
});

describe('C4 and C5 below', () => {
  it('C4 the strip under a cabinet is fixture + 1/4 − lip', () => {
    expect(formatLength(valanceHeight({ valanceClearance: inches(0.25) }, inches(1.5), inches(0.5)))).toBe(
      '1 1/4',
    );
  });
  it('C4 a light fixture is hidden by a strip, or by a light rail that is high enough', () => {
    const lit = survey([oneDoor({ underLight: { height: inches(1.5), lip: inches(0.5) } })]);
    const without = takeoff(lit, EDITION, CHOICES, TERMS);
    expect(without.fillers).toMatchObject([{ mark: 'N-01-V', reason: 'valance', height: inches(1.25) }]);
    expect(without.notes.map((note) => note.code)).toContain('valance.filler');
    expect(takeoff(lit, EDITION, choose({ lightRail: 'rail-1-1-2' }), TERMS).fillers).toEqual([]);
  });
  it('C5 the base stays below the door’s lower edge less the clearance, else a strip goes in', () => {
    // Toe 4 + rail 1 1/2 − overlay 1/2: the door begins 5 in above the floor.
    const shop = { baseClearance: inches(0.125) };
    const bottom = inches(5.5);
    expect(baseFiller(shop, { height: inches(4.75) }, bottom, inches(0.5), true)).toBe(0);
    expect(formatLength(baseFiller(shop, { height: inches(5) }, bottom, inches(0.5), true))).toBe('1/8');
  });
  it('C5 toe space lost and appliances’ toe doors are said', () => {
    const kitchen = survey([base('N-01', 24, 24, opening(1, 'pair', 21, 27.5))], {
      appliances: [
        appliance(
          'N-range',
          'range',
          { wall: 'N', at: 48, width: 30, bottom: 0, height: 36, depth: 26 },
          { toeDoor: inches(4.5) },
        ),
      ],
    });
    const codes = takeoff(kitchen, EDITION, choose({ base: 'base-5' }), TERMS).notes.map((note) => note.code);
    expect(codes).toEqual(expect.arrayContaining(['base.toe', 'base.appliance', 'base.filler']));
  });
});
