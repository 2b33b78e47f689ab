import { ternHollowEdition } from '@/db/seed/scenario/edition';
import { at, frame, opening, upper, wall } from '@/db/seed/scenario/build';
import { inches } from '@/lib/engine/length';
import type { Edition, Terms } from '@/lib/engine/edition-types';
import type { Cabinet, Choices, Survey } from '@/lib/engine/types';

export const EDITION: Edition = ternHollowEdition;

export const TERMS: Terms = {
  version: 1,
  tax: { mode: 'none', basis: 'invoice', rates: {}, place: 'Nowhere' },
  discount: { kind: 'none' },
  crewSize: 2,
};

export const CHOICES: Choices = {
  version: 1,
  kitchen: {
    style: 'square-flat-panel',
    species: 'red-oak',
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

export const choose = (kitchen: Partial<Choices['kitchen']>, more: Partial<Choices> = {}): Choices => ({
  ...CHOICES,
  kitchen: { ...CHOICES.kitchen, ...kitchen },
  ...more,
});

/** One north wall of 20 feet in a room of 20 by 12, ceiling at 96 in. */
export const survey = (cabinets: readonly Cabinet[], more: Partial<Survey> = {}): Survey => ({
  version: 1,
  kitchen: 'Test',
  measuredOn: '2026-11-02',
  yearBuilt: 1990,
  room: { outline: [at(0, 0), at(240, 0), at(240, 144), at(0, 144)], ceiling: inches(96), soffits: [] },
  walls: [wall('N', 'North wall', at(0, 144), at(240, 144))],
  cabinets,
  fillers: [],
  appliances: [],
  gaps: [],
  typed: {},
  ...more,
});

/** A wall cabinet with one door of 15 × 27 in a frame with 1 1/2 in members. */
export const oneDoor = (more: Partial<Cabinet> = {}, place = 24): Cabinet =>
  upper(
    'N-01',
    { at: place, width: 18, bottom: 54, height: 30 },
    frame(opening(1, 'door', 15, 27, { hinge: 'left' })),
    more,
  );
