import { inches } from '@/lib/engine/length';
import type { Choices, Survey } from '@/lib/engine/types';
import { appliance, at, base, drawerOver, drawers, frame, opening, upper, wall } from './build';

/** A small kitchen on one wall: another household of the same contractor. */
export const secondHousehold: Survey = {
  version: 1,
  kitchen: 'Alder Yard',
  measuredOn: '2026-10-05',
  yearBuilt: 1983,
  room: { outline: [at(0, 0), at(150, 0), at(150, 120), at(0, 120)], ceiling: inches(96), soffits: [] },
  walls: [wall('N', 'Kitchen wall', at(0, 120), at(150, 120))],
  cabinets: [
    base('N-01', 1, 24, drawerOver(21, 'pair'), { left: { exposed: true } }),
    base('N-02', 25, 36, drawerOver(33, 'pair', {}, 'falseFront'), { joinedRight: false }),
    base('N-03', 91, 18, drawers(15, 5, 5, 5, 8), { right: { exposed: true } }),
    upper('N-04', { at: 1, width: 24, bottom: 54, height: 30 }, frame(opening(1, 'pair', 21, 27)), {
      left: { exposed: true },
    }),
    upper('N-05', { at: 25, width: 36, bottom: 54, height: 30 }, frame(opening(1, 'pair', 33, 27)), {}),
    upper('N-06', { at: 61, width: 30, bottom: 72, height: 12 }, frame(opening(1, 'pair', 27, 9)), {}),
    upper(
      'N-07',
      { at: 91, width: 18, bottom: 54, height: 30 },
      frame(opening(1, 'door', 15, 27, { hinge: 'right' })),
      {
        right: { exposed: true },
      },
    ),
  ],
  fillers: [],
  appliances: [
    appliance(
      'N-sink',
      'sink',
      { wall: 'N', at: 27, width: 32, bottom: 28, height: 8, depth: 22 },
      { within: 'N-02' },
    ),
    appliance(
      'N-range',
      'range',
      { wall: 'N', at: 61, width: 30, bottom: 0, height: 36, depth: 26 },
      { handle: inches(1.75), toeDoor: inches(4.75) },
    ),
    appliance('N-hood', 'hood', { wall: 'N', at: 61, width: 30, bottom: 66, height: 6, depth: 18 }),
    appliance('N-refrigerator', 'refrigerator', {
      wall: 'N',
      at: 111,
      width: 33,
      bottom: 0,
      height: 67,
      depth: 30,
    }),
  ],
  gaps: [],
  typed: {},
};

export const secondHouseholdProposed: Choices = {
  version: 1,
  kitchen: {
    style: 'plain-slab',
    species: 'sugar-maple',
    finish: 'clear',
    overlay: 'half',
    pull: 'bar-5-steel',
    crown: 'none',
    base: 'none',
    lightRail: 'none',
    ends: 'flat',
    drawerBox: 'keep',
    counter: 'keep',
  },
  zones: {},
  inside: {},
};
