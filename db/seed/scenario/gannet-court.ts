import { inches } from '@/lib/engine/length';
import type { Choices, Survey } from '@/lib/engine/types';
import {
  appliance,
  at,
  base,
  column,
  cornerFrames,
  drawerOver,
  drawers,
  frame,
  freestanding,
  gap,
  opening,
  row,
  tall,
  upper,
  wall,
} from './build';

const HIGH = { bottom: 54, height: 36 };
const CLEAR = 33;
const door = (width: number, hinge: 'left' | 'right') => frame(opening(1, 'door', width, CLEAR, { hinge }));

/** An L of 2006 with an island and a corner of unequal legs, under a 9-foot ceiling. */
export const gannetCourt: Survey = {
  version: 1,
  kitchen: 'Gannet Court',
  measuredOn: '2026-11-20',
  yearBuilt: 2006,
  room: { outline: [at(0, 0), at(204, 0), at(204, 168), at(0, 168)], ceiling: inches(108), soffits: [] },
  walls: [
    wall('W', 'Range wall', at(0, 0), at(0, 168)),
    wall('N', 'Sink wall', at(0, 168), at(204, 168)),
    freestanding('I', 'Island', at(138.25, 78), at(65.75, 78)),
  ],
  cabinets: [
    base('W-01', 42, 24, drawerOver(21, 'pair'), { left: { exposed: true } }),
    base('W-02', 102, 24, drawers(21, 5, 9, 10.5)),
    base('W-03', 126, 42, opening(1, 'cornerFold', 16.5, 27.5), {
      ...cornerFrames({ legA: 42, legB: 36, otherWall: 'N', height: 30.5, depth: 24, hung: 'left' }),
    }),
    upper('W-04', { at: 42, width: 24, ...HIGH }, frame(opening(1, 'pair', 21, CLEAR)), {
      left: { exposed: true },
      right: { exposed: true },
    }),
    upper('W-05', { at: 102, width: 18, ...HIGH }, door(15, 'left'), { left: { exposed: true } }),
    upper('W-06', { at: 120, width: 24, ...HIGH }, frame(opening(1, 'pair', 21, CLEAR))),
    upper('W-07', { at: 144, width: 24, ...HIGH }, frame(opening(1, 'cornerFold', 10.5, CLEAR)), {
      ...cornerFrames({ legA: 24, legB: 24, otherWall: 'N', height: 36, depth: 12, hung: 'left' }),
    }),
    base('N-01', 36, 36, drawerOver(33, 'pair', {}, 'tiltOut'), { joinedRight: false }),
    base('N-02', 96, 18, drawers(15, 5, 5, 5, 8)),
    tall(
      'N-03',
      { at: 114.25, width: 30, height: 86 },
      frame(column(1.5, opening(1, 'pair', 27, 33), opening(2, 'pair', 27, 48.5))),
      { left: { exposed: true } },
    ),
    upper('N-04', { at: 24, width: 12, ...HIGH }, door(9, 'left'), { right: { exposed: true } }),
    upper(
      'N-05',
      { at: 80, width: 34, ...HIGH },
      frame(
        row(
          3,
          opening(1, 'door', 14, CLEAR, { hinge: 'left' }),
          opening(2, 'door', 14, CLEAR, { hinge: 'right' }),
        ),
      ),
      {
        left: { exposed: true },
      },
    ),
    upper('N-06', { at: 144.25, width: 37, bottom: 72, height: 18 }, frame(opening(1, 'pair', 34, 15)), {
      deep: 24,
      right: { exposed: true },
    }),
    base('I-01', 0.25, 24, drawers(21, 5, 9, 10.5), {
      zone: 'island',
      left: { exposed: true },
      backExposed: true,
    }),
    base('I-02', 24.25, 24, drawerOver(21, 'pair'), { zone: 'island', backExposed: true }),
    base('I-03', 48.25, 24, drawerOver(21, 'pair'), {
      zone: 'island',
      right: { exposed: true },
      backExposed: true,
    }),
  ],
  fillers: [],
  appliances: [
    appliance(
      'W-range',
      'range',
      { wall: 'W', at: 66, width: 36, bottom: 0, height: 36, depth: 26 },
      { handle: inches(2), toeDoor: inches(4.5) },
    ),
    appliance('W-hood', 'hood', { wall: 'W', at: 66.5, width: 35, bottom: 67, height: 24, depth: 20 }),
    appliance(
      'N-sink',
      'sink',
      { wall: 'N', at: 38, width: 32, bottom: 28, height: 8, depth: 22 },
      { within: 'N-01' },
    ),
    appliance(
      'N-dishwasher',
      'dishwasher',
      { wall: 'N', at: 72, width: 24, bottom: 0, height: 34, depth: 24 },
      { handle: inches(1.5), toeDoor: inches(4.5) },
    ),
    appliance('N-refrigerator', 'refrigerator', {
      wall: 'N',
      at: 145,
      width: 35.5,
      bottom: 0,
      height: 70,
      depth: 30,
    }),
  ],
  gaps: [gap('N-window', 'window', { wall: 'N', at: 42, width: 34, bottom: 44, height: 40 }, 3)],
  typed: {},
};

export const gannetCourtProposed: Choices = {
  version: 1,
  kitchen: {
    style: 'raised-square-panel',
    species: 'black-cherry',
    finish: 'stain-2',
    overlay: 'half',
    pull: 'arch-bronze',
    crown: 'stepped-4-1-4',
    base: 'base-4-1-4',
    lightRail: 'rail-1-1-2',
    ends: 'panelled',
    drawerBox: 'keep',
    counter: 'keep',
  },
  zones: { island: { finish: 'clear' } },
  inside: {},
};
