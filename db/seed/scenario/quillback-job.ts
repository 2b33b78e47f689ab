import { inches } from '@/lib/engine/length';
import type { Choices, Survey } from '@/lib/engine/types';
import {
  appliance,
  at,
  base,
  cornerFrames,
  drawerOver,
  drawers,
  frame,
  gap,
  opening,
  upper,
  wall,
} from './build';

const HIGH = { bottom: 54, height: 30 };

/** The one job of the second contractor: a small L. */
export const quillbackJob: Survey = {
  version: 1,
  kitchen: 'Thistle Row',
  measuredOn: '2026-11-16',
  yearBuilt: 1968,
  room: { outline: [at(0, 0), at(144, 0), at(144, 126), at(0, 126)], ceiling: inches(96), soffits: [] },
  walls: [wall('W', 'Range wall', at(0, 0), at(0, 126)), wall('N', 'Window wall', at(0, 126), at(144, 126))],
  cabinets: [
    base('W-01', 39, 21, drawerOver(18, 'door', { hinge: 'left' }), {
      left: { exposed: true },
      joinedRight: false,
    }),
    base('W-02', 90, 36, opening(1, 'cornerFold', 10.5, 27.5), {
      ...cornerFrames({ legA: 36, legB: 36, otherWall: 'N', height: 30.5, depth: 24, hung: 'left' }),
    }),
    upper('W-03', { at: 39, width: 21, ...HIGH }, frame(opening(1, 'door', 18, 27, { hinge: 'left' })), {
      left: { exposed: true },
    }),
    upper('W-04', { at: 60, width: 30, bottom: 72, height: 12 }, frame(opening(1, 'pair', 27, 9))),
    upper('W-05', { at: 90, width: 24, ...HIGH }, frame(opening(1, 'pair', 21, 27)), {
      right: { exposed: true },
    }),
    base('N-01', 36, 36, drawerOver(33, 'pair', {}, 'falseFront')),
    base('N-02', 72, 18, drawers(15, 5, 5, 5, 8), { right: { exposed: true } }),
    upper('N-03', { at: 88, width: 24, ...HIGH }, frame(opening(1, 'pair', 21, 27)), {
      left: { exposed: true },
      right: { exposed: true },
    }),
  ],
  fillers: [],
  appliances: [
    appliance(
      'W-range',
      'range',
      { wall: 'W', at: 60, width: 30, bottom: 0, height: 36, depth: 26 },
      { handle: inches(1.75), toeDoor: inches(4.75) },
    ),
    appliance('W-hood', 'hood', { wall: 'W', at: 60, width: 30, bottom: 66, height: 6, depth: 18 }),
    appliance(
      'N-sink',
      'sink',
      { wall: 'N', at: 38, width: 32, bottom: 28, height: 8, depth: 22 },
      { within: 'N-01' },
    ),
  ],
  gaps: [gap('N-window', 'window', { wall: 'N', at: 40, width: 42, bottom: 44, height: 36 }, 3)],
  typed: {},
};

export const quillbackJobProposed: Choices = {
  version: 1,
  kitchen: {
    style: 'broad-flat-panel',
    species: 'red-maple',
    finish: 'paint-4',
    overlay: 'half',
    pull: 'cup-bronze',
    crown: 'cove-2-1-4',
    base: 'none',
    lightRail: 'none',
    ends: 'flat',
    drawerBox: 'keep',
    counter: 'keep',
  },
  zones: {},
  inside: {},
};
