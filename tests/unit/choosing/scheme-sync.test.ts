import * as fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { applyChanges, changesBetween, type Edit } from '@/components/choosing/scheme-edit';
import {
  advance,
  maySend,
  shown,
  startSync,
  type Stored,
  type Sync,
} from '@/components/choosing/scheme-sync';
import { applyChange } from '@/lib/engine/choices';
import { CHOICE_KEYS, ZONES, type ChoiceChange, type Choices } from '@/lib/engine/types';

const start: Choices = {
  version: 1,
  kitchen: {
    style: 's1',
    species: 'w1',
    finish: 'f1',
    overlay: 'o1',
    pull: 'p1',
    crown: 'none',
    base: 'none',
    lightRail: 'none',
    ends: 'e1',
    drawerBox: 'd1',
    counter: 'c1',
  },
  zones: {},
  inside: {},
};

const stored = (choices: Choices, version = 1): Stored => ({
  choices,
  decided: [],
  unsure: [],
  version,
  totalCents: 0,
});

let count = 0;
const edit = (...changes: ChoiceChange[]): { kind: 'edit'; edit: Edit } => ({
  kind: 'edit',
  edit: {
    id: `edit ${++count}`,
    label: '',
    changes,
    marks: changes.flatMap((change) =>
      'key' in change ? [{ key: change.key, as: 'decided' as const }] : [],
    ),
  },
});

const finish = (option: string): ChoiceChange => ({ key: 'finish', zone: 'kitchen', option });
const crown = (option: string): ChoiceChange => ({ key: 'crown', zone: 'kitchen', option });

const anyChange: fc.Arbitrary<ChoiceChange> = fc.oneof(
  fc.record({
    key: fc.constantFrom(...CHOICE_KEYS),
    zone: fc.constantFrom('kitchen' as const, ...ZONES),
    option: fc.constantFrom('a', 'b', 'c'),
  }),
  fc.record({
    inside: fc.constantFrom('N-01-1', 'N-02-1'),
    option: fc.constantFrom('pullOut', 'bin', null),
  }),
);

/** Choices as a kitchen reads them: what each zone has for each key, whatever way it is written down. */
const meaning = (choices: Choices) => ({
  kitchen: choices.kitchen,
  zones: ZONES.map((zone) => ({ ...choices.kitchen, ...choices.zones[zone] })),
  inside: Object.entries(choices.inside).sort(),
});

describe('changes between two sets of choices', () => {
  it('lead from one to the other, whatever the two are', () => {
    fc.assert(
      fc.property(fc.array(anyChange, { maxLength: 12 }), fc.array(anyChange, { maxLength: 12 }), (a, b) => {
        const from = a.reduce(applyChange, start);
        const to = b.reduce(applyChange, start);
        expect(meaning(applyChanges(from, changesBetween(from, to)))).toEqual(meaning(to));
      }),
    );
  });

  it('are none between equals', () => {
    fc.assert(
      fc.property(fc.array(anyChange, { maxLength: 12 }), (a) => {
        const choices = a.reduce(applyChange, start);
        expect(changesBetween(choices, choices)).toEqual([]);
      }),
    );
  });
});

describe('a scheme in the browser', () => {
  it('shows an edit at once, before the server has answered', () => {
    const sync = advance(startSync(stored(start)), edit(finish('f2')));
    expect(shown(sync).choices.kitchen.finish).toBe('f2');
    expect(sync.stored.choices.kitchen.finish).toBe('f1');
  });

  it('sends one edit at a time and in the order in which they were made', () => {
    let sync = advance(startSync(stored(start)), edit(finish('f2')));
    sync = advance(sync, { kind: 'send' });
    sync = advance(sync, edit(finish('f3')));
    expect(maySend(sync)).toBe(false);
    expect(sync.sending?.changes).toEqual([finish('f2')]);
    sync = advance(sync, { kind: 'stored', stored: stored(applyChange(start, finish('f2')), 2) });
    expect(maySend(sync)).toBe(true);
    expect(shown(sync).choices.kitchen.finish).toBe('f3');
  });

  it('keeps every edit through a lost connection, in order, and sends nothing until it is back', () => {
    let sync: Sync = advance(startSync(stored(start)), edit(finish('f2')));
    sync = advance(sync, { kind: 'send' });
    sync = advance(sync, edit(crown('c3')));
    sync = advance(sync, { kind: 'lost' });
    expect(maySend(sync)).toBe(false);
    expect(sync.waiting.map((one) => one.changes)).toEqual([[finish('f2')], [crown('c3')]]);
    expect(shown(sync).choices.kitchen).toMatchObject({ finish: 'f2', crown: 'c3' });
    expect(maySend(advance(sync, { kind: 'online' }))).toBe(true);
  });

  it('does not apply twice an edit that arrived although its answer was lost', () => {
    let sync: Sync = advance(startSync(stored(start)), edit(finish('f2')));
    sync = advance(sync, { kind: 'send' });
    sync = advance(sync, edit(crown('c3')));
    sync = advance(sync, { kind: 'lost' });
    sync = advance(sync, { kind: 'conflict', theirs: stored(applyChange(start, finish('f2')), 2) });
    expect(sync.conflict).toBeNull();
    expect(sync.waiting.map((one) => one.changes)).toEqual([[crown('c3')]]);
  });

  it('puts both together when somebody else changed something else', () => {
    let sync: Sync = advance(startSync(stored(start)), edit(finish('f2')));
    sync = advance(sync, { kind: 'send' });
    const theirs = { ...stored(applyChange(start, crown('c3')), 2), decided: ['crown'], unsure: ['counter'] };
    sync = advance(sync, { kind: 'conflict', theirs });
    expect(sync.conflict).toBeNull();
    expect(sync.merged).toBe(true);
    expect(shown(sync).choices.kitchen).toMatchObject({ finish: 'f2', crown: 'c3' });
    expect([...shown(sync).decided].sort()).toEqual(['crown', 'finish']);
    expect(shown(sync).unsure).toEqual(['counter']);
  });

  it('asks when somebody else changed the same thing, and takes whichever is chosen', () => {
    let sync: Sync = advance(startSync(stored(start)), edit(finish('f2')));
    sync = advance(sync, { kind: 'send' });
    const theirs = stored(applyChange(start, finish('f9')), 2);
    sync = advance(sync, { kind: 'conflict', theirs });
    expect(sync.conflict?.theirs).toBe(theirs);
    expect(maySend(sync)).toBe(false);
    expect(shown(sync).choices.kitchen.finish).toBe('f2');

    const mine = advance(sync, { kind: 'keepMine' });
    expect(shown(mine).choices.kitchen.finish).toBe('f2');
    expect(mine.stored.version).toBe(2);
    expect(maySend(mine)).toBe(true);

    const other = advance(sync, { kind: 'takeTheirs' });
    expect(shown(other).choices.kitchen.finish).toBe('f9');
    expect(other.waiting).toEqual([]);
  });

  it('goes back over any run of edits to where it began, and forward again to where it was', () => {
    fc.assert(
      fc.property(fc.array(fc.array(anyChange, { minLength: 1, maxLength: 3 }), { maxLength: 8 }), (runs) => {
        let sync = startSync(stored(start));
        for (const changes of runs) sync = advance(sync, edit(...changes));
        const end = meaning(shown(sync).choices);
        for (let n = 0; n < runs.length; n++) sync = advance(sync, { kind: 'undo', id: `u${n}` });
        expect(meaning(shown(sync).choices)).toEqual(meaning(start));
        expect(sync.past).toEqual([]);
        for (let n = 0; n < runs.length; n++) sync = advance(sync, { kind: 'redo', id: `r${n}` });
        expect(meaning(shown(sync).choices)).toEqual(end);
      }),
    );
  });

  it('shows the stored scheme again when the server refuses, with its sentence', () => {
    let sync: Sync = advance(startSync(stored(start)), edit(finish('f2')));
    sync = advance(sync, { kind: 'send' });
    sync = advance(sync, { kind: 'refused', sentence: 'The scheme was signed.' });
    expect(shown(sync).choices.kitchen.finish).toBe('f1');
    expect(sync.refused).toBe('The scheme was signed.');
  });

  it('sends nothing more once the two totals differ, and keeps what was chosen', () => {
    let sync: Sync = advance(startSync(stored(start)), edit(finish('f2')));
    sync = advance(sync, { kind: 'send' });
    sync = advance(sync, { kind: 'mismatch', hereCents: 100, thereCents: 101 });
    expect(maySend(sync)).toBe(false);
    expect(shown(sync).choices.kitchen.finish).toBe('f2');
    expect(sync.mismatch).toEqual({ hereCents: 100, thereCents: 101 });
  });

  it('an older version that arrives late changes nothing', () => {
    const sync = startSync(stored(applyChange(start, finish('f2')), 5));
    expect(advance(sync, { kind: 'refreshed', stored: stored(start, 4) })).toBe(sync);
  });
});
