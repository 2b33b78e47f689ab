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
  upper,
  wall,
} from './build';

const TOP = { top: 2 };
const HIGH = { bottom: 54, height: 42 };
const CLEAR = 38.5;

/** Mara and Teo Winslade's: a U of 1974 with a peninsula, wall cabinets tight to an 8-foot ceiling, 31 openings. */
export const sorrelLane: Survey = {
  version: 1,
  kitchen: 'Sorrel Lane',
  measuredOn: '2026-11-09',
  yearBuilt: 1974,
  room: {
    outline: [at(0, 0), at(228, 0), at(228, 150), at(0, 150)],
    ceiling: inches(96),
    soffits: [],
  },
  walls: [
    wall('W', 'Range wall', at(0, 0), at(0, 150)),
    wall('N', 'Window wall', at(0, 150), at(228, 150)),
    freestanding('P', 'Peninsula', at(156, 150), at(156, 65.75)),
  ],
  cabinets: [
    // The range wall, from the refrigerator to the corner.
    upper(
      'W-01',
      { at: 14.75, width: 36, bottom: 78, height: 18 },
      frame(opening(1, 'pair', 33, 14.5), TOP),
      { deep: 24, left: { exposed: true }, right: { exposed: true }, joinedRight: false },
    ),
    base('W-02', 51, 15, drawerOver(12, 'door', { hinge: 'left' })),
    base('W-03', 96, 18, drawers(15, 5, 5, 5, 8)),
    base('W-04', 114, 36, opening(1, 'cornerFold', 10.5, 27.5), {
      ...cornerFrames({ legA: 36, legB: 36, otherWall: 'N', height: 30.5, depth: 24, hung: 'left' }),
    }),
    upper(
      'W-05',
      { at: 51, width: 15, ...HIGH },
      frame(opening(1, 'door', 12, CLEAR, { hinge: 'left' }), TOP),
    ),
    upper('W-06', { at: 66, width: 30, bottom: 72, height: 24 }, frame(opening(1, 'pair', 27, 20.5), TOP)),
    upper(
      'W-07',
      { at: 96, width: 30, ...HIGH },
      frame(
        row(
          3,
          opening(1, 'door', 12, CLEAR, { hinge: 'left' }),
          opening(2, 'door', 12, CLEAR, { hinge: 'right' }),
        ),
        TOP,
      ),
    ),
    upper('W-08', { at: 126, width: 24, ...HIGH }, frame(opening(1, 'cornerFold', 10.5, CLEAR), TOP), {
      ...cornerFrames({ legA: 24, legB: 24, otherWall: 'N', height: 42, depth: 12, top: 2, hung: 'left' }),
    }),
    // The window wall, from the corner to the peninsula.
    base('N-01', 60, 36, drawerOver(33, 'pair', {}, 'falseFront')),
    base('N-02', 96, 24, drawerOver(21, 'pair')),
    base('N-03', 120, 36, opening(1, 'cornerFold', 10.5, 27.5), {
      backExposed: true,
      ...cornerFrames({ legA: 36, legB: 36, otherWall: 'P', height: 30.5, depth: 24, hung: 'right' }),
    }),
    upper(
      'N-04',
      { at: 24, width: 32, ...HIGH },
      frame(
        row(
          3,
          opening(1, 'door', 13, CLEAR, { hinge: 'left' }),
          opening(2, 'door', 13, CLEAR, { hinge: 'right' }),
        ),
        TOP,
      ),
      { right: { exposed: true } },
    ),
    upper(
      'N-05',
      { at: 100, width: 20, ...HIGH },
      frame(
        column(
          1.5,
          opening(1, 'door', 17, 10.5, { hinge: 'left', glass: true }),
          opening(2, 'door', 17, 26.5, { hinge: 'left' }),
        ),
        TOP,
      ),
      { left: { exposed: true } },
    ),
    upper(
      'N-06',
      { at: 120, width: 36, ...HIGH },
      frame(
        row(
          3,
          opening(1, 'door', 15, CLEAR, { hinge: 'left' }),
          opening(2, 'door', 15, CLEAR, { hinge: 'right' }),
        ),
        TOP,
      ),
      { right: { exposed: true } },
    ),
    // The peninsula.
    base('P-01', 36, 18, drawers(15, 5, 5, 5, 8), { zone: 'island', backExposed: true }),
    base(
      'P-02',
      54,
      30,
      column(
        1.5,
        row(3, opening(1, 'drawer', 12, 5), opening(2, 'drawer', 12, 5)),
        opening(3, 'pair', 27, 21),
      ),
      { zone: 'island', right: { exposed: true }, backExposed: true },
    ),
  ],
  fillers: [],
  appliances: [
    appliance('W-refrigerator', 'refrigerator', {
      wall: 'W',
      at: 15,
      width: 35,
      bottom: 0,
      height: 70,
      depth: 30,
    }),
    appliance(
      'W-range',
      'range',
      { wall: 'W', at: 66, width: 30, bottom: 0, height: 36, depth: 26 },
      { handle: inches(1.75), toeDoor: inches(4.75) },
    ),
    appliance('W-hood', 'hood', { wall: 'W', at: 66, width: 30, bottom: 66, height: 6, depth: 18 }),
    appliance(
      'N-dishwasher',
      'dishwasher',
      { wall: 'N', at: 36, width: 24, bottom: 0, height: 34, depth: 24 },
      { handle: inches(1.5), toeDoor: inches(4.5) },
    ),
    appliance(
      'N-sink',
      'sink',
      { wall: 'N', at: 62, width: 32, bottom: 28, height: 8, depth: 22 },
      { within: 'N-01' },
    ),
  ],
  gaps: [
    gap('N-window', 'window', { wall: 'N', at: 60, width: 36, bottom: 44, height: 40 }, 3),
    gap('N-doorway', 'doorway', { wall: 'N', at: 176, width: 36, bottom: 0, height: 80 }, 3),
  ],
  typed: {},
};

/** What Rowan proposes to begin from. */
export const sorrelLaneProposed: Choices = {
  version: 1,
  kitchen: {
    style: 'square-flat-panel',
    species: 'red-oak',
    finish: 'stain-3',
    overlay: 'half',
    pull: 'bar-5-steel',
    crown: 'cove-3-1-4',
    base: 'none',
    lightRail: 'none',
    ends: 'flat',
    drawerBox: 'keep',
    counter: 'keep',
  },
  zones: {},
  inside: {},
};
