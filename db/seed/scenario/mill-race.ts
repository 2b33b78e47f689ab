import { inches } from '@/lib/engine/length';
import type { Choices, Survey } from '@/lib/engine/types';
import {
  appliance,
  at,
  base,
  column,
  drawerOver,
  drawers,
  filler,
  frame,
  gap,
  opening,
  row,
  tall,
  upper,
  wall,
} from './build';

const HIGH = { bottom: 54, height: 30 };
const CLEAR = 27;

/** A galley of 1991: two walls face to face, wall cabinets a foot below the ceiling. */
export const millRace: Survey = {
  version: 1,
  kitchen: 'Mill Race',
  measuredOn: '2026-09-14',
  yearBuilt: 1991,
  room: { outline: [at(0, 0), at(144, 0), at(144, 98), at(0, 98)], ceiling: inches(96), soffits: [] },
  walls: [wall('N', 'Sink wall', at(0, 98), at(144, 98)), wall('S', 'Range wall', at(144, 0), at(0, 0))],
  cabinets: [
    base('N-01', 1.5, 18, drawerOver(15, 'door', { hinge: 'left' })),
    base('N-02', 19.5, 36, drawerOver(33, 'pair', {}, 'tiltOut'), { joinedRight: false }),
    base('N-03', 79.5, 24, drawers(21, 5, 9, 10.5)),
    tall(
      'N-04',
      { at: 103.5, width: 24, height: 80 },
      frame(column(1.5, opening(1, 'pair', 21, 27), opening(2, 'pair', 21, 48.5))),
      { right: { exposed: true } },
    ),
    upper('N-05', { at: 1.5, width: 18, ...HIGH }, frame(opening(1, 'door', 15, CLEAR, { hinge: 'left' })), {
      right: { exposed: true },
    }),
    upper('N-06', { at: 57.5, width: 22, ...HIGH }, frame(opening(1, 'pair', 19, CLEAR)), {
      left: { exposed: true },
    }),
    upper('N-07', { at: 79.5, width: 24, ...HIGH }, frame(opening(1, 'pair', 21, CLEAR))),
    base(
      'S-01',
      1.5,
      30,
      column(
        1.5,
        row(3, opening(1, 'drawer', 12, 5), opening(2, 'drawer', 12, 5)),
        opening(3, 'pair', 27, 21),
      ),
      { joinedRight: false },
    ),
    base('S-02', 61.5, 21, drawers(18, 5, 5, 5, 8)),
    upper('S-03', { at: 1.5, width: 30, ...HIGH }, frame(opening(1, 'pair', 27, CLEAR))),
    upper('S-04', { at: 31.5, width: 30, bottom: 72, height: 12 }, frame(opening(1, 'pair', 27, 9))),
    upper('S-05', { at: 61.5, width: 21, ...HIGH }, frame(opening(1, 'door', 18, CLEAR, { hinge: 'right' }))),
    upper('S-06', { at: 82.75, width: 36, bottom: 72, height: 12 }, frame(opening(1, 'pair', 33, 9)), {
      deep: 24,
      left: { exposed: true },
      right: { exposed: true },
    }),
  ],
  fillers: [
    filler('N-F1', 'base', { wall: 'N', at: 0, width: 1.5, bottom: 4, height: 30.5 }),
    filler('N-F2', 'wall', { wall: 'N', at: 0, width: 1.5, ...HIGH }),
    filler('S-F1', 'base', { wall: 'S', at: 0, width: 1.5, bottom: 4, height: 30.5 }),
    filler('S-F2', 'wall', { wall: 'S', at: 0, width: 1.5, ...HIGH }),
  ],
  appliances: [
    appliance(
      'N-sink',
      'sink',
      { wall: 'N', at: 21.5, width: 32, bottom: 28, height: 8, depth: 22 },
      { within: 'N-02' },
    ),
    appliance(
      'N-dishwasher',
      'dishwasher',
      { wall: 'N', at: 55.5, width: 24, bottom: 0, height: 34, depth: 24 },
      { handle: inches(1.5), toeDoor: inches(4.5) },
    ),
    appliance(
      'S-range',
      'range',
      { wall: 'S', at: 31.5, width: 30, bottom: 0, height: 36, depth: 26 },
      { handle: inches(1.75), toeDoor: inches(4.75) },
    ),
    appliance('S-hood', 'hood', { wall: 'S', at: 31.5, width: 30, bottom: 66, height: 6, depth: 18 }),
    appliance('S-refrigerator', 'refrigerator', {
      wall: 'S',
      at: 83,
      width: 35,
      bottom: 0,
      height: 69,
      depth: 30,
    }),
  ],
  gaps: [gap('N-window', 'window', { wall: 'N', at: 24, width: 28, bottom: 44, height: 36 }, 3)],
  typed: {},
};

export const millRaceProposed: Choices = {
  version: 1,
  kitchen: {
    style: 'narrow-flat-panel',
    species: 'sugar-maple',
    finish: 'paint-2',
    overlay: 'half',
    pull: 'knob-black',
    crown: 'cove-3-1-4',
    base: 'none',
    lightRail: 'rail-1-1-2',
    ends: 'flat',
    drawerBox: 'melamine',
    counter: 'keep',
  },
  zones: {},
  inside: { 'N-01-2': 'pull-outs', 'S-01-3': 'pull-outs' },
};
