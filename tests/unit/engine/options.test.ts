import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { sorrelLane, sorrelLaneProposed } from '@/db/seed/scenario/sorrel-lane';
import { gannetCourt, gannetCourtProposed } from '@/db/seed/scenario/gannet-court';
import { applyChange, chosenIn, clash, optionsOf, reach, swapsFor } from '@/lib/engine/choices';
import { EngineError } from '@/lib/engine/error';
import { deltaAfresh, insideOptions, options, optionsAll } from '@/lib/engine/options';
import { takeoff, totalAfresh, totalOf } from '@/lib/engine/takeoff';
import { CHOICE_KEYS, ZONES, type ChoiceChange, type Choices, type ZoneOrKitchen } from '@/lib/engine/types';
import { EDITION, TERMS } from './scene';

const lane = { survey: sorrelLane, edition: EDITION, choices: sorrelLaneProposed, terms: TERMS };
const court = { survey: gannetCourt, edition: EDITION, choices: gannetCourtProposed, terms: TERMS };

const anyChange: fc.Arbitrary<ChoiceChange> = fc
  .record({
    key: fc.constantFrom(...CHOICE_KEYS),
    zone: fc.constantFrom<ZoneOrKitchen>('kitchen', ...ZONES),
    pick: fc.nat(40),
  })
  .map(({ key, zone, pick }) => {
    const all = optionsOf(EDITION, key);
    const where = EDITION.zonedKeys.includes(key) ? zone : 'kitchen';
    return { key, zone: where, option: all[pick % all.length]?.id ?? 'none' };
  });

/** A state that can be reached by picking, swaps accepted. */
const anyChoices = fc
  .array(anyChange, { maxLength: 8 })
  .map((changes) =>
    changes.reduce((now, change) => reach(EDITION, now, change, ZONES).choices, sorrelLaneProposed),
  );

describe('M5 the delta of an option', () => {
  it('M5 is the total with it, after its swaps, less the total now, by a full recomputation', () => {
    for (const input of [lane, court])
      for (const zone of ['kitchen', 'wall', 'island'] as const)
        for (const [key, states] of Object.entries(optionsAll(input, zone)))
          for (const state of states) {
            if (state.availability === 'notAvailable') continue;
            const found = CHOICE_KEYS.find((one) => one === key);
            if (!found) throw new Error(key);
            const expected = state.chosen ? 0 : deltaAfresh(input, { key: found, zone, option: state.id });
            expect([key, state.id, state.delta]).toEqual([key, state.id, expected]);
          }
  });
  it('M11 what is remembered equals a full recomputation, in any state', () => {
    fc.assert(
      fc.property(anyChoices, (choices) => {
        const input = { ...lane, choices };
        const total = totalAfresh(input);
        return totalOf(input) === total && takeoff(sorrelLane, EDITION, choices, TERMS).total === total;
      }),
      { numRuns: 150 },
    );
  });
  it('M5 deltas of a path add up to the difference of its ends, and undo restores to the cent', () => {
    fc.assert(
      fc.property(fc.array(anyChange, { maxLength: 12 }), (path) => {
        let now: Choices = sorrelLaneProposed;
        let sum = 0;
        const seen: { choices: Choices; total: number }[] = [];
        for (const change of path) {
          const total = totalOf({ ...lane, choices: now });
          seen.push({ choices: now, total });
          const delta = deltaAfresh({ ...lane, choices: now }, change);
          if (delta === null) continue;
          sum += delta;
          now = reach(EDITION, now, change, ZONES).choices;
        }
        const end = totalOf({ ...lane, choices: now });
        const start = totalOf(lane);
        return (
          sum === end - start && seen.every(({ choices, total }) => totalOf({ ...lane, choices }) === total)
        );
      }),
      { numRuns: 60 },
    );
  });
  it('M11 the order of choices does not matter where no swaps are needed', () => {
    // Keys that never clash with each other.
    const free = ['pull', 'crown', 'base', 'lightRail', 'ends', 'drawerBox', 'counter'] as const;
    fc.assert(
      fc.property(
        fc.shuffledSubarray([...free], { minLength: 2 }),
        fc.infiniteStream(fc.nat(20)),
        (keys, stream) => {
          const changes = keys.map((key): ChoiceChange => {
            const all = optionsOf(EDITION, key);
            const pick = Number(stream.next().value) % all.length;
            return { key, zone: 'kitchen', option: all[pick]?.id ?? 'none' };
          });
          const forth = changes.reduce(applyChange, sorrelLaneProposed);
          const back = [...changes].reverse().reduce(applyChange, sorrelLaneProposed);
          return totalOf({ ...lane, choices: forth }) === totalOf({ ...lane, choices: back });
        },
      ),
      { numRuns: 60 },
    );
  });
  it('M5 only here and everywhere both have a delta', () => {
    const only = options(lane, 'finish', 'island').find((one) => one.id === 'paint-12');
    const everywhere = options(lane, 'finish', 'kitchen').find((one) => one.id === 'paint-12');
    expect(only?.delta).toBeGreaterThan(0);
    expect(everywhere?.delta).toBeGreaterThan(only?.delta ?? Infinity);
  });
});

describe('X1 what goes together', () => {
  it('X1 from any state every style is reachable by at most one accepted swap', () => {
    fc.assert(
      fc.property(anyChoices, fc.constantFrom<ZoneOrKitchen>('kitchen', ...ZONES), (choices, zone) =>
        EDITION.styles.every((style) => {
          const reached = reach(EDITION, choices, { key: 'style', zone, option: style.id }, ZONES);
          return (
            reached.availability !== 'notAvailable' &&
            ZONES.every((one) => clash(EDITION, chosenIn(reached.choices, one)) === null)
          );
        }),
      ),
      { numRuns: 200 },
    );
  });
  it('X1 a swap is named, and after it everything goes together', () => {
    const foil = options(lane, 'finish', 'kitchen').find((one) => one.id === 'foil-1');
    expect(foil).toMatchObject({ availability: 'availableWithSwap' });
    expect(foil?.reason).toContain('does not go on');
    expect(foil?.swaps).toContainEqual({ key: 'species', zone: 'kitchen', option: 'foil' });
  });
  it('X1 what was picked never gives way', () => {
    fc.assert(
      fc.property(anyChoices, anyChange, (choices, change) => {
        if (!('key' in change)) return true;
        const reached = reach(EDITION, choices, change, ZONES);
        if (reached.availability === 'notAvailable') return reached.choices === choices;
        const zones = change.zone === 'kitchen' ? ZONES : [change.zone];
        return zones.every((zone) => chosenIn(reached.choices, zone)[change.key] === change.option);
      }),
      { numRuns: 300 },
    );
  });
  it('X1 an overlay that this kitchen’s frames are too narrow for says so', () => {
    const wide = options(lane, 'overlay', 'kitchen').find((one) => one.id === 'wide');
    expect(wide).toMatchObject({ availability: 'notAvailable', delta: null });
    expect(wide?.reason).toContain('the largest overlay that can be built here is');
  });
  it('X1 storage goes only where it fits', () => {
    const inDoor = insideOptions(lane, 'N-02-2');
    expect(inDoor.map((one) => [one.id, one.availability])).toEqual([
      ['none', 'available'],
      ['pull-outs', 'available'],
      ['pull-out', 'available'],
      ['tray-dividers', 'available'],
      ['waste-bins', 'notAvailable'],
    ]);
    expect(inDoor[0]).toMatchObject({ chosen: true, delta: 0 });
  });
  it('X1 swaps can be asked for alone', () => {
    expect(
      swapsFor(EDITION, sorrelLaneProposed, { key: 'pull', zone: 'kitchen', option: 'none' }, ZONES),
    ).toEqual([]);
  });
  it('X1 an option that the edition does not have is a listed error', () => {
    const odd = { ...sorrelLaneProposed, kitchen: { ...sorrelLaneProposed.kitchen, style: 'no-such' } };
    expect(() => takeoff(sorrelLane, EDITION, odd, TERMS)).toThrow(EngineError);
  });
});
