import { describe, expect, it } from 'vitest';
import {
  base,
  drawerOver,
  drawers,
  filler,
  frame,
  freestanding,
  at,
  opening,
  row,
  upper,
} from '@/db/seed/scenario/build';
import { sorrelLane, sorrelLaneProposed } from '@/db/seed/scenario/sorrel-lane';
import { boxParts, boxWidth, slideLength } from '@/lib/engine/boxes';
import { formatLength, inches } from '@/lib/engine/length';
import { panelLayout } from '@/lib/engine/panels';
import { takeoff } from '@/lib/engine/takeoff';
import { adhesiveGallons } from '@/lib/engine/veneer';
import type { Survey } from '@/lib/engine/types';
import { CHOICES, choose, EDITION, oneDoor, survey, TERMS } from './scene';

const strips = (of: Survey, choices = CHOICES) =>
  new Map(
    takeoff(of, EDITION, choices, TERMS).veneer.map((strip) => [
      strip.mark,
      [formatLength(strip.width), formatLength(strip.length), strip.cabinets.length],
    ]),
  );

const pairCabinet = (id: string, place: number, more: Parameters<typeof upper>[3] = {}) =>
  upper(id, { at: place, width: 30, bottom: 54, height: 30 }, frame(opening(1, 'pair', 27, 27)), more);

describe('V1 veneer strips', () => {
  // Trim 1/8 per free edge and the rounding are common practice, no source; sums by hand.
  it('V1 a cabinet alone: stiles full height, rails between them', () => {
    const found = strips(survey([pairCabinet('N-01', 24)]));
    // Stile 1 1/2 + 2 × 1/8 = 1 3/4 by 30 1/4; rails 1 3/4 by 27, whose ends butt the stiles.
    expect([...found]).toEqual([
      ['N-01-SL', ['1 3/4', '30 1/4', 1]],
      ['N-01-SR', ['1 3/4', '30 1/4', 1]],
      ['N-01-RT', ['1 3/4', '27', 1]],
      ['N-01-RB', ['1 3/4', '27', 1]],
    ]);
  });
  it('V1 where two cabinets meet one strip covers both stiles', () => {
    const found = strips(survey([pairCabinet('N-01', 24), pairCabinet('N-02', 54)]));
    expect(found.get('N-01-SR')).toEqual(['3 1/4', '30 1/4', 2]);
    expect(found.has('N-02-SL')).toBe(false);
  });
  it('V1 two strips where faces are out of one plane by more than 1/32', () => {
    const flush = survey([pairCabinet('N-01', 24), pairCabinet('N-02', 54, { outOfPlane: inches(1 / 32) })]);
    expect(strips(flush).get('N-01-SR')?.[2]).toBe(2);
    const proud = survey([pairCabinet('N-01', 24), pairCabinet('N-02', 54, { outOfPlane: inches(3 / 64) })]);
    // They butt each other: one free edge each. 1 1/2 + 1/8 = 1 5/8.
    expect(strips(proud).get('N-01-SR')).toEqual(['1 5/8', '30 1/4', 1]);
    expect(strips(proud).get('N-02-SL')).toEqual(['1 5/8', '30 1/4', 1]);
  });
  it('V1 two strips where wood or finish differ, and none on what is kept', () => {
    const mixed = survey([pairCabinet('N-01', 24), pairCabinet('N-02', 54, { zone: 'tall' })]);
    const choices = choose({}, { zones: { tall: { finish: 'stain-3' } } });
    expect(strips(mixed, choices).has('N-02-SL')).toBe(true);
    const kept = survey([pairCabinet('N-01', 24), pairCabinet('N-02', 54, { action: 'keep' })]);
    expect([...strips(kept).keys()].some((mark) => mark.startsWith('N-02'))).toBe(false);
    expect(strips(kept).get('N-01-SR')).toEqual(['1 3/4', '30 1/4', 1]);
  });
  it('V1 at an exposed end the stile strip is wider by the panel, at a flush filler by the filler', () => {
    const found = strips(
      survey([pairCabinet('N-01', 1.5, { right: { exposed: true } })], {
        fillers: [filler('N-F1', 'wall', { wall: 'N', at: 0, width: 1.5, bottom: 54, height: 30 })],
      }),
    );
    expect(found.get('N-01-SR')?.[0]).toBe('2');
    expect(found.get('N-01-SL')?.[0]).toBe('3 1/4');
  });
  it('V1 a mullion runs between the rails it is framed into', () => {
    const cabinet = upper(
      'N-01',
      { at: 24, width: 36, bottom: 54, height: 30 },
      frame(
        row(3, opening(1, 'door', 15, 27, { hinge: 'left' }), opening(2, 'door', 15, 27, { hinge: 'right' })),
      ),
    );
    expect(strips(survey([cabinet])).get('N-01-M1')).toEqual(['3 1/4', '27', 1]);
  });
});

describe('V3 bonded area and adhesive', () => {
  it('V3 a cabinet’s covered face is its frame less its openings, without trim', () => {
    // 30 × 30 − 27 × 27 = 171 in² = 1.1875 ft², half up 1.19.
    expect(takeoff(survey([pairCabinet('N-01', 24)]), EDITION, CHOICES, TERMS).bonded.area).toBe(119);
  });
  it('V3 both faces take adhesive', () => {
    // 308 and 420 ft² per gallon of one face are two makers' figures: 2 × 154 / 308 = 1; 2 × 210 / 420 = 1.
    expect(adhesiveGallons(15_400, 308)).toBe(100);
    expect(adhesiveGallons(21_000, 420)).toBe(100);
  });
});

describe('P1 to P3 panels', () => {
  it('P1 an exposed end is as deep as the cabinet, base panels reach the floor and are notched at the toe', () => {
    const cabinet = base('N-01', 24, 24, drawerOver(21, 'pair'), {
      right: { exposed: true },
      overhang: inches(0.25),
    });
    const [end] = takeoff(survey([cabinet]), EDITION, CHOICES, TERMS).panels;
    expect(end).toMatchObject({
      mark: 'N-01-ER',
      kind: 'end',
      width: inches(24),
      height: inches(34.5),
      notch: { width: inches(3), height: inches(4) },
      sticks: { count: 2, thickness: inches(0.25) },
    });
  });
  it('P2 toes are skinned, and not where a base moulding covers them', () => {
    const kitchen = survey([
      base('N-01', 24, 24, drawerOver(21, 'pair')),
      base('N-02', 48, 18, drawers(15, 5, 5, 5, 8)),
    ]);
    const toes = (choices = CHOICES) =>
      takeoff(kitchen, EDITION, choices, TERMS).panels.filter((panel) => panel.kind === 'toe');
    expect(toes()).toMatchObject([{ mark: 'N-T1', width: inches(42), height: inches(4) }]);
    expect(toes(choose({ base: 'base-4-1-4' }))).toEqual([]);
  });
  it('P3 a back is laid out in equal panels between stiles', () => {
    // 72 1/2 wide, stiles 2 1/4, panels up to 18: four would be (72.5 − 5 × 2.25) / 4 = 15.3125.
    expect(panelLayout(inches(72.5), inches(2.25), inches(2.25), inches(18))).toMatchObject({
      panels: 4,
      panelWidth: inches(15.3125),
    });
    const island = survey(
      [
        base('I-01', 0.25, 36, drawerOver(33, 'pair'), {
          zone: 'island',
          backExposed: true,
          left: { exposed: true },
          right: { exposed: true },
        }),
      ],
      { walls: [freestanding('I', 'Island', at(100, 60), at(63.5, 60))] },
    );
    const wrap = takeoff(island, EDITION, choose({ ends: 'panelled' }), TERMS).panels.find(
      (panel) => panel.kind === 'islandWrap',
    );
    expect(wrap).toMatchObject({ width: inches(36.5), height: inches(34.5), layout: { panels: 2 } });
  });
});

describe('B1 to B4 drawer boxes and pull-outs', () => {
  it('B1 an opening of 15 with side-mount slides takes a box of 14', () => {
    // A slide maker's sheet: 1/2 in a side, +1/32 −0; accepted 13 15/16 to 14.
    expect(boxWidth(inches(15), inches(0.5))).toBe(inches(14));
    expect(boxWidth(inches(15) + 3, inches(0.5))).toBe(inches(14));
    expect(boxWidth(inches(15) - 1, inches(0.5))).toBe(inches(13.9375));
  });
  it('B2 the longest even length that fits, from 12 to 28', () => {
    // 24 − 3/4 − 1/4 − 1/2 = 22 1/2 → 22.
    expect(slideLength(inches(24), inches(0.75), inches(0.25), inches(0.5))).toBe(inches(22));
    expect(slideLength(inches(40), inches(0.75), inches(0.25), inches(0.5))).toBe(inches(28));
    expect(slideLength(inches(12), inches(0.75), inches(0.25), inches(0.5))).toBeNull();
  });
  it('B4 butt-jointed parts and the four top edges', () => {
    // Common practice, no source: 5/8 melamine. 14 wide, 4 high, 22 long: front 12 3/4; bottom 12 3/4 × 20 3/4.
    const { parts, edgeBand } = boxParts(inches(14), inches(4), inches(22), inches(0.625));
    expect(parts).toEqual([
      { name: 'side', count: 2, width: inches(4), length: inches(22) },
      { name: 'front', count: 1, width: inches(4), length: inches(12.75) },
      { name: 'back', count: 1, width: inches(4), length: inches(12.75) },
      { name: 'bottom', count: 1, width: inches(12.75), length: inches(20.75) },
    ]);
    expect(edgeBand).toBe(inches(69.5));
  });
  it('B4 a box is as high as its opening less the shop’s clearance', () => {
    const { boxes } = takeoff(
      survey([base('N-01', 24, 18, drawers(15, 5, 5, 5, 8))]),
      EDITION,
      choose({ drawerBox: 'melamine' }),
      TERMS,
    );
    expect(
      boxes.map((box) => [
        box.mark,
        formatLength(box.width),
        formatLength(box.height),
        formatLength(box.length),
      ]),
    ).toEqual([
      ['N-01-1-D1', '14', '4', '22'],
      ['N-01-2-D1', '14', '4', '22'],
      ['N-01-3-D1', '14', '4', '22'],
      ['N-01-4-D1', '14', '7', '22'],
    ]);
  });
  it('B3 a pull-out behind doors loses the hinges’ intrusion, and spacers are packed out by it and the overhang', () => {
    const cabinet = base('N-01', 24, 24, drawerOver(21, 'pair'), { overhang: inches(0.25) });
    const { boxes } = takeoff(
      survey([cabinet]),
      EDITION,
      choose({}, { inside: { 'N-01-2': 'pull-outs' } }),
      TERMS,
    );
    // 21 − 2 × 1 1/4 − 2 × 1/2 = 17 1/2.
    expect(boxes).toHaveLength(2);
    expect(boxes[0]).toMatchObject({
      mark: 'N-01-2-P1',
      width: inches(17.5),
      spacers: { left: inches(1.5), right: inches(1.5) },
    });
  });
  it('B3 where nothing of use is left it cannot be built so, and leaving it out clears it', () => {
    const cabinet = base('N-01', 24, 13, drawerOver(10, 'pair'));
    const taken = takeoff(
      survey([cabinet]),
      EDITION,
      choose({}, { inside: { 'N-01-2': 'pull-out' } }),
      TERMS,
    );
    expect(taken.boxes).toEqual([]);
    expect(taken.notes.find((note) => note.code === 'pullOut.none')).toMatchObject({
      severity: 'cannotBeBuilt',
      wayOut: { changes: [{ inside: 'N-01-2', option: null }] },
    });
  });
  it('B2 a drawer whose volume is too heavy for its slide is noted', () => {
    const weak = EDITION.slides.map((slide) => ({ ...slide, ratedPounds: 10 }));
    const { notes } = takeoff(
      survey([base('N-01', 24, 18, drawers(15, 5, 5, 5, 8))]),
      { ...EDITION, slides: weak },
      choose({ drawerBox: 'melamine' }),
      TERMS,
    );
    expect(notes.map((note) => note.code)).toContain('slide.load');
  });
});

describe('A1 parts have names', () => {
  it('A1 every front is marked by wall, cabinet and opening, and no mark stands twice', () => {
    const { fronts, veneer, mouldings, panels, boxes, fillers } = takeoff(
      sorrelLane,
      EDITION,
      {
        ...sorrelLaneProposed,
        kitchen: { ...sorrelLaneProposed.kitchen, drawerBox: 'birch', base: 'base-5' },
      },
      TERMS,
    );
    for (const front of fronts) expect(front.mark).toMatch(/^[A-Z]-\d{2}-\d+[LR]?$/);
    for (const parts of [fronts, veneer, mouldings, panels, boxes, fillers]) {
      const marks = parts.map((part) => part.mark);
      expect(new Set(marks).size).toBe(marks.length);
    }
  });
  it('A1 the kitchen of Sorrel Lane has 31 openings', () => {
    const openings = takeoff(sorrelLane, EDITION, sorrelLaneProposed, TERMS).fronts.map(
      (front) => front.opening,
    );
    expect(new Set(openings).size).toBe(31);
  });
});

describe('S1 and S2 a survey that does not close is told where and by how much', () => {
  const noteOf = (of: Survey, code: string) =>
    takeoff(of, EDITION, CHOICES, TERMS).notes.find((note) => note.code === code);
  it('S1 a row that is off by more than 1/16 in names cabinet, row, sum and difference', () => {
    const off = (width: number) =>
      survey([oneDoor({ frame: frame(opening(1, 'door', width, 27, { hinge: 'left' })) })]);
    expect(noteOf(off(15.0625), 'survey.row')).toBeUndefined();
    const note = noteOf(off(15.25), 'survey.row');
    expect(note).toMatchObject({ rule: 'S1', severity: 'cannotBeBuilt', parts: ['N-01-1'] });
    expect(note?.bench).toContain('come to 18 1/4 in, the frame is 18 in: 1/4 in too much');
  });
  it('S1 a column likewise', () => {
    const cabinet = oneDoor({ frame: frame(opening(1, 'door', 15, 26, { hinge: 'left' })) });
    expect(noteOf(survey([cabinet]), 'survey.column')?.bench).toContain('1 in too little');
  });
  it('S1 judges the surveyed openings, before any filler', () => {
    const { notes } = takeoff(sorrelLane, EDITION, sorrelLaneProposed, TERMS);
    expect(notes.filter((note) => note.rule === 'S1' || note.rule === 'S2')).toEqual([]);
  });
  it('S2 overlaps within a band, a wall that is too short, the ceiling and the room', () => {
    expect(
      noteOf(survey([pairCabinet('N-01', 24), pairCabinet('N-02', 50)]), 'survey.overlap')?.bench,
    ).toContain('4 in');
    expect(noteOf(survey([pairCabinet('N-01', 215)]), 'survey.wall')?.bench).toContain('5 in');
    const high = upper(
      'N-01',
      { at: 24, width: 30, bottom: 70, height: 30 },
      frame(opening(1, 'pair', 27, 27)),
    );
    expect(noteOf(survey([high]), 'survey.ceiling')?.bench).toContain('4 in');
    const outside = survey([pairCabinet('N-01', 24)], {
      room: { outline: [at(0, 0), at(40, 0), at(40, 144), at(0, 144)], ceiling: inches(96), soffits: [] },
    });
    expect(noteOf(outside, 'survey.room')?.bench).toContain('14 in');
  });
});
