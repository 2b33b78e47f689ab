import { describe, expect, it } from 'vitest';
import {
  base,
  column,
  cornerFrames,
  drawers,
  frame,
  opening,
  row,
  upper,
  wall,
  at,
} from '@/db/seed/scenario/build';
import { STYLES } from '@/db/seed/scenario/styles';
import { foldHinges, hingeCount } from '@/lib/engine/hinges';
import { inches } from '@/lib/engine/length';
import { panelMovement } from '@/lib/engine/movement';
import {
  cornerDiagonal,
  foldLeaf,
  frontArea,
  frontSize,
  frontWeight,
  hundredths,
  leafWidth,
  legOpening,
} from '@/lib/engine/openings';
import { reveal } from '@/lib/engine/reveals';
import { strikeAngle } from '@/lib/engine/strikes';
import { takeoff } from '@/lib/engine/takeoff';
import type { HingeSet } from '@/lib/engine/edition-types';
import { CHOICES, choose, EDITION, oneDoor, survey, TERMS } from './scene';

const flat = STYLES[0];
if (!flat) throw new Error('The price book has no style.');

describe('O1 a front is its opening and its overlays', () => {
  // A door supplier's published measuring guide.
  it('O1 15 × 27 at 1/2 is 16 × 28', () => {
    expect(frontSize(inches(15), inches(0.5), inches(0.5))).toBe(inches(16));
    expect(frontSize(inches(27), inches(0.5), inches(0.5))).toBe(inches(28));
    const { fronts } = takeoff(survey([oneDoor()]), EDITION, CHOICES, TERMS);
    expect(fronts).toMatchObject([{ mark: 'N-01-1', width: inches(16), height: inches(28), hinge: 'left' }]);
  });
  it('S4 of two readings of a width the narrower rules', () => {
    const cabinet = oneDoor({
      frame: frame(opening(1, 'door', 15, 27, { hinge: 'left', widthSecond: inches(14.875) })),
    });
    const { fronts } = takeoff(survey([cabinet]), EDITION, CHOICES, TERMS);
    expect(fronts[0]?.width).toBe(inches(15.875));
  });
});

describe('O2 a pair splits the opening plus overlays, less the gap', () => {
  // Overlay 1/2: computed from the rule. Overlay 1 1/4: the same measuring guide, last two computed.
  it.each([
    [24, 0.5, 12.4375],
    [30, 0.5, 15.4375],
    [24, 1.25, 13.1875],
  ])('O2 %s at %s gives leaves of %s', (width, overlay, leaf) => {
    expect(leafWidth(inches(width), inches(overlay), inches(overlay), inches(0.125))).toBe(inches(leaf));
  });
  it('O2 both leaves are equal and the slack goes into the gap', () => {
    const cabinet = oneDoor({ frame: frame(opening(1, 'pair', 15, 27)) });
    const { fronts } = takeoff(survey([cabinet]), EDITION, CHOICES, TERMS);
    expect(fronts.map((front) => [front.mark, front.hinge])).toEqual([
      ['N-01-1L', 'left'],
      ['N-01-1R', 'right'],
    ]);
    expect(fronts[0]?.width).toBe(fronts[1]?.width);
  });
});

describe('O3 reveals', () => {
  // Common practice, no source.
  it('O3 a stile of 1 1/2 at a wall shows 1/4 at overlay 1 1/4, and 1 1/8 at 3/8', () => {
    expect(reveal(inches(1.5), inches(1.25), 0)).toBe(inches(0.25));
    expect(reveal(inches(1.5), inches(0.375), 0)).toBe(inches(1.125));
  });
  it('O3 a mullion that shows too little cannot be built so, and the note names the largest overlay that can', () => {
    const cabinet = upper(
      'N-01',
      { at: 24, width: 30, bottom: 54, height: 30 },
      frame(
        row(
          1.5,
          opening(1, 'door', 12.75, 27, { hinge: 'right' }),
          opening(2, 'door', 12.75, 27, { hinge: 'left' }),
        ),
      ),
    );
    const { notes } = takeoff(survey([cabinet]), EDITION, choose({ overlay: 'wide' }), TERMS);
    const note = notes.find((one) => one.code === 'reveal.small');
    expect(note).toMatchObject({ severity: 'cannotBeBuilt', rule: 'O3', parts: ['N-01-1', 'N-01-2'] });
    // (1 1/2 − 2 × 1/8) / 2 = 5/8: two leaves hang on this mullion, 1/8 each (the hinge set's minimum).
    expect(note?.bench).toContain('The largest overlay that can be built is 5/8 in.');
    expect(note?.wayOut?.changes).toEqual([{ key: 'overlay', zone: 'kitchen', option: 'half' }]);
  });
  it('O3 between rows the style’s smallest row gap is needed', () => {
    const wide = base('N-01', 24, 18, drawers(15, 5, 5, 5, 8));
    const codes = (overlay: string) =>
      takeoff(survey([wide]), EDITION, choose({ overlay }), TERMS).notes.map((note) => note.code);
    expect(codes('half')).not.toContain('reveal.small');
    expect(codes('wide')).toContain('reveal.small');
  });
});

describe('O4 what is too small for five pieces becomes a slab', () => {
  it('O4 a low drawer front of a raised style is noted and priced flat', () => {
    const cabinet = base('N-01', 24, 18, drawers(15, 5, 5, 5, 8));
    const taken = takeoff(survey([cabinet]), EDITION, choose({ style: 'raised-square-panel' }), TERMS);
    expect(taken.fronts.map((front) => front.build)).toEqual(['slab', 'slab', 'slab', 'fivePiece']);
    expect(taken.notes.find((note) => note.code === 'front.slab')?.parts).toEqual([
      'N-01-1',
      'N-01-2',
      'N-01-3',
    ]);
    expect(taken.lines.map((line) => line.code)).toEqual(
      expect.arrayContaining(['fronts.base', 'slabs.base']),
    );
  });
});

describe('O5 billed area and weight', () => {
  it('O5 a front counts at least the style’s minimum, and the sum is rounded once, half up', () => {
    // 12 × 12 in is exactly 1 ft²; the minimum is 1.50.
    expect(hundredths(frontArea(inches(12), inches(12), 0))).toBe(100);
    expect(hundredths(frontArea(inches(12), inches(12), 150))).toBe(150);
    // Three fronts of 3.1111… ft² are 9.33, not 3 × 3.11 = 9.33 nor 9.34; of 12 1/16 × 12, 1.005208…, three are 3.02.
    expect(hundredths(3 * frontArea(inches(12.0625), inches(12), 0))).toBe(302);
    expect(3 * hundredths(frontArea(inches(12.0625), inches(12), 0))).toBe(303);
  });
  it('O5 a slab weighs W·H·t × density', () => {
    const slab = frontWeight(inches(16), inches(28), flat, 'slab', 25);
    // 16 × 28 × 0.75 in³ × 0.025 lb/in³ = 8.4 lb, by hand.
    expect(slab).toBe(8400);
  });
  it('O5 five pieces weigh less by the panel’s thinner field', () => {
    // 336 in³ less (16 − 4.5)(28 − 4.5)(0.75 − 0.25) = 135.125 in³, × 0.025 = 5.021875 lb, by hand.
    expect(frontWeight(inches(16), inches(28), flat, 'fivePiece', 25)).toBe(5022);
    expect(frontWeight(inches(16), inches(28), flat, 'fivePiece', 25, true)).toBeLessThan(5022);
  });
});

describe('O6 doors that strike', () => {
  it('O6 a thin leaf whose hinge stands half its width off a wall strikes at 120°', () => {
    // cos 120° = −1/2: from the geometry of a line turning about a point.
    expect(strikeAngle(16, 0, 8)).toBeCloseTo(120, 9);
    expect(strikeAngle(16, 0, 0)).toBeCloseTo(90, 9);
    expect(strikeAngle(16, 0, 16)).toBeNull();
  });
  it('O6 a handle makes it strike sooner', () => {
    const bare = strikeAngle(16, 0.75, 1) ?? 0;
    expect(strikeAngle(15, 2, 1) ?? 180).toBeLessThan(bare);
  });
  it('O6 a door hinged at a wall is noted with its angle', () => {
    const { notes } = takeoff(survey([oneDoor({}, 0)]), EDITION, CHOICES, TERMS);
    expect(notes.find((note) => note.code === 'door.strike')).toMatchObject({ parts: ['N-01-1'] });
    const free = takeoff(survey([oneDoor({}, 60)]), EDITION, CHOICES, TERMS);
    expect(free.notes.map((note) => note.code)).not.toContain('door.strike');
  });
});

describe('O7 solid panels move with the season', () => {
  // USDA FPL-GTR-190, table 13-5; 18 in, 6 to 10 %.
  it.each([
    ['hard maple', 3530, 0.254],
    ['cherry', 2480, 0.179],
    ['red oak', 3690, 0.266],
    ['black walnut', 2740, 0.197],
  ])('O7 %s', (_name, coefficient, change) => {
    expect(panelMovement(18, coefficient, 6, 10)).toBeCloseTo(change, 3);
  });
  it('O7 the handbook’s own example: 232 mm from 8 to 11 % becomes 233.7 mm', () => {
    expect(232 + panelMovement(232, 2450, 8, 11)).toBeCloseTo(233.7, 1);
  });
  it('O7 a panel that moves beyond its groove cannot be built so', () => {
    const tight = EDITION.styles.map((style) =>
      style.id === 'raised-square-panel' ? { ...style, panelPlay: inches(0.125) } : style,
    );
    const choices = choose({ style: 'raised-square-panel' });
    const notes = (styles: typeof tight) =>
      takeoff(survey([oneDoor()]), { ...EDITION, styles }, choices, TERMS).notes.map((note) => note.code);
    expect(notes(tight)).toContain('panel.movement');
    expect(notes([...EDITION.styles])).not.toContain('panel.movement');
  });
});

const set = (more: Partial<HingeSet>): HingeSet => {
  const [first] = EDITION.hingeSets;
  if (!first) throw new Error('The price book has no hinges.');
  return { ...first, ...more };
};

describe('H1 hinges by the supplier’s chart', () => {
  // One supplier prints 2/3/4/5 hinges up to 15/30/45/60 lb.
  const byWeight = set({ byHeight: [{ upTo: inches(200), hinges: 1 }] });
  it.each([
    [15_000, 2],
    [15_001, 3],
    [30_000, 3],
    [45_000, 4],
    [60_000, 5],
  ])('H1 %s thousandths of a pound ask for %s hinges, the limit included', (weight, hinges) => {
    expect(hingeCount(byWeight, inches(16), inches(28), weight)).toBe(hinges);
  });
  it('H1 past the last row there is no count', () => {
    expect(hingeCount(byWeight, inches(16), inches(28), 60_001)).toBeNull();
  });
  it('H1 another chart: 2 hinges to 6 kg and 3 to 12 kg up to 600 mm wide, one more for wider', () => {
    // Thousandths of a pound: 6 kg = 13.228 lb, 12 kg = 26.455 lb.
    const metric = set({
      byHeight: [{ upTo: inches(200), hinges: 1 }],
      byWeight: [
        { upTo: 13_228, hinges: 2 },
        { upTo: 26_455, hinges: 3 },
      ],
      extraAboveWidth: { width: inches(23.625), hinges: 1 },
    });
    expect(hingeCount(metric, inches(20), inches(28), 13_228)).toBe(2);
    expect(hingeCount(metric, inches(24), inches(28), 13_228)).toBe(3);
    expect(hingeCount(metric, inches(20), inches(28), 20_000)).toBe(3);
  });
  it('H1 a door past the chart is a note that stops signing, never a guess', () => {
    const hingeSets = EDITION.hingeSets.map((one) => ({
      ...one,
      byHeight: [{ upTo: inches(20), hinges: 2 }],
    }));
    const { notes } = takeoff(survey([oneDoor()]), { ...EDITION, hingeSets }, CHOICES, TERMS);
    expect(notes.find((note) => note.code === 'hinge.chart')).toMatchObject({
      severity: 'cannotBeBuilt',
      parts: ['N-01-1'],
    });
  });
});

describe('S3 and H2 a corner cabinet', () => {
  // Common practice, no source.
  it('S3 legs of 42 and 36 at depth 24 span 18 and 12, diagonal 21.63 in; 36 and 36 give 16.97', () => {
    expect(inches(42) - inches(24)).toBe(inches(18));
    expect(cornerDiagonal(42, 36, 24)).toBeCloseTo(21.63, 2);
    expect(cornerDiagonal(36, 36, 24)).toBeCloseTo(16.97, 2);
  });
  it('S3 opening and leaf of a leg', () => {
    expect(legOpening(inches(36), inches(24), inches(1.5))).toBe(inches(10.5));
    // 10 1/2 + 1/2 − 15/16 = 10 1/16.
    expect(foldLeaf(inches(10.5), inches(0.5), inches(0.9375))).toBe(inches(10.0625));
  });
  const corner = survey(
    [
      base('W-01', 108, 36, opening(1, 'cornerFold', 10.5, 27.5), {
        ...cornerFrames({ legA: 36, legB: 36, otherWall: 'N', height: 30.5, depth: 24, hung: 'left' }),
      }),
    ],
    {
      walls: [
        wall('W', 'West wall', at(0, 0), at(0, 144)),
        wall('N', 'North wall', at(0, 144), at(240, 144)),
      ],
    },
  );
  it('H2 the hung leaf carries both leaves on the frame, the other hangs on the joint', () => {
    const { fronts, hardware } = takeoff(corner, EDITION, CHOICES, TERMS);
    expect(fronts.map(({ mark, width, hinge }) => ({ mark, width, hinge }))).toEqual([
      { mark: 'W-01-1L', width: inches(10.0625), hinge: 'left' },
      { mark: 'W-01-1R', width: inches(10.0625), hinge: 'right' },
    ]);
    const counts = Object.fromEntries(hardware.map((one) => [one.item, one.count]));
    expect(counts).toMatchObject({ 'hinge-half': 2, 'hinge-half-joint': 2, 'bar-5-steel': 1 });
  });
  it('H2 the weight of both leaves counts for the frame’s hinges', () => {
    const chart = set({ byHeight: [{ upTo: inches(200), hinges: 2 }] });
    expect(foldHinges(chart, inches(10), inches(28), 8000)).toMatchObject({ frame: 2 });
    expect(foldHinges(chart, inches(10), inches(28), 16_000)).toMatchObject({ frame: 3 });
    const { fold, ...none } = chart;
    expect(fold).toBeDefined();
    expect(foldHinges(none, inches(10), inches(28), 8000)).toEqual({ fault: 'noJoint' });
  });
});

describe('S4 kinds of opening', () => {
  it('S4 each kind gives what it says', () => {
    const cabinet = base(
      'N-01',
      24,
      24,
      column(
        1.5,
        opening(1, 'tiltOut', 21, 4),
        opening(2, 'falseFront', 21, 4),
        opening(3, 'open', 21, 6),
        opening(4, 'appliancePanel', 21, 9, {
          applianceSize: { width: inches(23.5), height: inches(9.25) },
        }),
      ),
    );
    const { fronts } = takeoff(survey([cabinet]), EDITION, CHOICES, TERMS);
    expect(fronts.map(({ mark, kind, hinges }) => ({ mark, kind, hinges }))).toEqual([
      { mark: 'N-01-1', kind: 'falseFront', hinges: 0 },
      { mark: 'N-01-2', kind: 'falseFront', hinges: 0 },
      { mark: 'N-01-4', kind: 'appliancePanel', hinges: 0 },
    ]);
    // The appliance's own sheet rules over the opening.
    expect(fronts[2]).toMatchObject({ width: inches(23.5), height: inches(9.25) });
  });
  it('S4 a leaf wider than the style allows is noted and stays one leaf', () => {
    const cabinet = upper(
      'N-01',
      { at: 24, width: 30, bottom: 54, height: 30 },
      frame(opening(1, 'door', 27, 27, { hinge: 'left' })),
    );
    const { fronts, notes } = takeoff(survey([cabinet]), EDITION, CHOICES, TERMS);
    expect(fronts).toHaveLength(1);
    expect(notes.map((note) => note.code)).toContain('front.wide');
  });
  it('S4 what is kept has no fronts, no veneer and no price', () => {
    const taken = takeoff(survey([oneDoor({ action: 'keep' })]), EDITION, CHOICES, TERMS);
    expect(taken.fronts).toEqual([]);
    expect(taken.veneer).toEqual([]);
    expect(taken.total).toBe(0);
  });
  it('S4 what is replaced carries its own price and no veneer', () => {
    const taken = takeoff(survey([oneDoor({ action: 'replace' })]), EDITION, CHOICES, TERMS);
    expect(taken.veneer).toEqual([]);
    expect(taken.lines.map((line) => line.code)).toEqual(
      expect.arrayContaining(['new-wall.wall', 'new-wall-width.wall', 'labour-removal.wall']),
    );
  });
});
