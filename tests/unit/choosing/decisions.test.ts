import { describe, expect, it } from 'vitest';
import { answerWords, changeWords, decisionsOf, scopesOf, swapWords } from '@/components/choosing/decisions';
import type { Edition } from '@/lib/engine/edition-types';
import type { Choices, Survey, Zone } from '@/lib/engine/types';

/** An edition with names alone: two woods and finishes, one counter, nothing to store. */
const names = (...all: string[]) => all.map((name) => ({ id: name.toLowerCase(), name }));
const edition = {
  styles: names('Square', 'Raised'),
  species: names('Oak', 'Maple'),
  finishes: names('Clear', 'Chalk'),
  overlays: names('Half'),
  pulls: names('Knob', 'Bar'),
  crowns: names('Cove'),
  bases: [],
  lightRails: [],
  ends: names('Flat', 'Panelled'),
  drawerBoxes: names('Kept'),
  counters: names('Kept'),
  storage: [{ id: 'none', name: 'None', kind: 'none' }],
  zonedKeys: ['finish', 'crown'],
} as unknown as Edition;

const surveyOf = (...zones: Zone[]) => ({ cabinets: zones.map((zone) => ({ zone })) }) as unknown as Survey;

const choices: Choices = {
  version: 1,
  kitchen: {
    style: 'square',
    species: 'oak',
    finish: 'clear',
    overlay: 'half',
    pull: 'knob',
    crown: 'none',
    base: 'none',
    lightRail: 'none',
    ends: 'flat',
    drawerBox: 'kept',
    counter: 'kept',
  },
  zones: { base: { finish: 'chalk' } },
  inside: {},
};

describe('what there is to decide', () => {
  it('leaves out every key with one answer only, and storage where none is sold', () => {
    expect(decisionsOf(edition).map((one) => one.key)).toEqual([
      'style',
      'species',
      'finish',
      'crown',
      'pull',
      'ends',
    ]);
  });

  it('may differ by zone only where the edition says so and the kitchen has more than one', () => {
    expect(scopesOf(edition, surveyOf('wall', 'base', 'base'), 'finish')).toEqual([
      'kitchen',
      'wall',
      'base',
    ]);
    expect(scopesOf(edition, surveyOf('wall', 'base'), 'style')).toEqual(['kitchen']);
    expect(scopesOf(edition, surveyOf('base'), 'finish')).toEqual(['kitchen']);
  });

  it('offers no crown for base cabinets', () => {
    expect(scopesOf(edition, surveyOf('wall', 'tall', 'base'), 'crown')).toEqual(['kitchen', 'wall', 'tall']);
  });
});

describe('choices in words', () => {
  it('name the zones that differ', () => {
    expect(answerWords(edition, choices, 'finish')).toBe('Clear; base cabinets: Chalk');
    expect(answerWords(edition, choices, 'crown')).toBe('None');
    expect(answerWords(edition, choices, 'inside')).toBe('Nothing added');
  });

  it('name one change, and what a choice brings with it once', () => {
    expect(changeWords(edition, { key: 'finish', zone: 'wall', option: 'chalk' })).toBe(
      'Finish, wall cabinets: Chalk',
    );
    expect(changeWords(edition, { inside: 'N-01-1', option: null })).toBe('Inside N-01-1: nothing added');
    expect(
      swapWords(edition, [
        { key: 'species', zone: 'wall', option: 'maple' },
        { key: 'species', zone: 'base', option: 'maple' },
      ]),
    ).toBe('with Maple');
  });
});
