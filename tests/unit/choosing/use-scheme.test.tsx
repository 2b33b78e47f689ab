// @vitest-environment jsdom
import { act, useEffect } from 'react';
import { createRoot, type Root } from 'react-dom/client';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { keepEdits, keptEdits } from '@/components/choosing/kept-edits';
import { shown } from '@/components/choosing/scheme-sync';
import { storedOf, useScheme } from '@/components/choosing/use-scheme';
import type { SchemeView } from '@/lib/contracts/scheme';
import { applyChange } from '@/lib/engine/choices';
import type { ChoiceChange, Choices } from '@/lib/engine/types';

Reflect.set(globalThis, 'IS_REACT_ACT_ENVIRONMENT', true);

const choices: Choices = {
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

const scheme: SchemeView = {
  id: '22222222-2222-4222-8222-222222222222',
  jobId: '11111111-1111-4111-8111-111111111111',
  letter: 'A',
  name: 'First',
  choices,
  decided: [],
  unsure: [],
  version: 1,
  totalCents: 100,
  proposed: true,
  updatedAt: '2026-12-01T12:00:00.000Z',
};

const finish = (option: string): ChoiceChange => ({ key: 'finish', zone: 'kitchen', option });
const crown = (option: string): ChoiceChange => ({ key: 'crown', zone: 'kitchen', option });

interface Sent {
  readonly version: number;
  readonly changes: readonly ChoiceChange[];
  readonly totalCents: number;
  readonly decided: readonly string[];
}

/** A server of one scheme; `reach` says whether the connection holds. */
function serverOf(first: SchemeView) {
  const server = {
    now: first,
    reach: true,
    asked: [] as Sent[],
    /** What the server computes; the screen's own figure unless it is set. */
    computes: null as number | null,
  };
  const answer = (body: unknown, status = 200) => new Response(JSON.stringify(body), { status });
  vi.stubGlobal('fetch', async (_address: string, init: { body: string }) => {
    if (!server.reach) throw new TypeError('Failed to fetch');
    const sent: Sent = JSON.parse(init.body);
    server.asked.push(sent);
    const conflict = (detail: unknown) =>
      answer({ fault: { code: 'conflict', sentence: 'Changed meanwhile.', detail } }, 409);
    if (sent.version !== server.now.version) return conflict(server.now);
    if (server.computes !== null && server.computes !== sent.totalCents)
      return conflict({ ...server.now, computedCents: server.computes });
    server.now = {
      ...server.now,
      choices: sent.changes.reduce(applyChange, server.now.choices),
      decided: [...sent.decided],
      version: server.now.version + 1,
      totalCents: sent.totalCents,
    };
    return answer(server.now);
  });
  return server;
}

type Scheme = ReturnType<typeof useScheme>;
let root: Root;
let held: Scheme | null = null;

function Holder({ onScheme }: { onScheme: (scheme: Scheme) => void }) {
  const one = useScheme({
    company: 'tern-hollow',
    jobId: scheme.jobId,
    scheme,
    totalOf: (of) => (of.kitchen.finish === 'f1' ? 100 : 150),
    onStored: ignore,
  });
  useEffect(() => {
    onScheme(one);
  });
  return null;
}
const ignore = () => undefined;

const hold = (one: Scheme) => {
  held = one;
};
const now = (): Scheme => {
  if (!held) throw new Error('Nothing is on the screen.');
  return held;
};
const mount = async () => {
  root = createRoot(document.createElement('div'));
  await act(async () => root.render(<Holder onScheme={hold} />));
};
const choose = (change: ChoiceChange) =>
  act(async () =>
    now().edit({
      label: '',
      changes: [change],
      marks: 'key' in change ? [{ key: change.key, as: 'decided' }] : [],
    }),
  );

beforeEach(() => localStorage.clear());
afterEach(async () => {
  await act(async () => root.unmount());
  held = null;
  vi.unstubAllGlobals();
});

describe('a scheme on the screen', () => {
  it('sends each edit with the version it was made on and the total that it shows', async () => {
    const server = serverOf(scheme);
    await mount();
    await choose(finish('f2'));
    await choose(crown('c3'));
    expect(server.asked).toMatchObject([
      { version: 1, changes: [finish('f2')], totalCents: 150, decided: ['finish'] },
      { version: 2, changes: [crown('c3')], totalCents: 150, decided: ['finish', 'crown'] },
    ]);
    expect(now().sync.stored.version).toBe(3);
  });

  it('shows what is chosen without a connection, keeps it, and sends it in order when it is back', async () => {
    const server = serverOf(scheme);
    await mount();
    server.reach = false;
    await choose(finish('f2'));
    await choose(crown('c3'));
    expect(now().sync.offline).toBe(true);
    expect(shown(now().sync).choices.kitchen).toMatchObject({ finish: 'f2', crown: 'c3' });
    expect(keptEdits(scheme.id)?.edits).toHaveLength(2);

    server.reach = true;
    await act(async () => {
      window.dispatchEvent(new Event('online'));
    });
    expect(server.now.choices.kitchen).toMatchObject({ finish: 'f2', crown: 'c3' });
    expect(server.asked.map((one) => one.changes)).toEqual([[finish('f2')], [crown('c3')]]);
    expect(keptEdits(scheme.id)).toBeNull();
  });

  it('sends after a reload what the page before could not', async () => {
    const server = serverOf(scheme);
    keepEdits(scheme.id, storedOf(scheme), [
      { id: 'left', label: '', changes: [finish('f2')], marks: [{ key: 'finish', as: 'decided' }] },
    ]);
    await mount();
    expect(server.now.choices.kitchen.finish).toBe('f2');
    expect(keptEdits(scheme.id)).toBeNull();
  });

  it('holds both answers when another screen changed the same thing, and sends the one that is taken', async () => {
    const server = serverOf(scheme);
    await mount();
    server.now = { ...scheme, choices: applyChange(choices, finish('f9')), version: 2, totalCents: 150 };
    await choose(finish('f2'));
    expect(now().sync.conflict?.theirs.choices.kitchen.finish).toBe('f9');
    expect(shown(now().sync).choices.kitchen.finish).toBe('f2');
    await act(async () => now().tell({ kind: 'keepMine' }));
    expect(server.now.choices.kitchen.finish).toBe('f2');
    expect(server.now.version).toBe(3);
  });

  it('shows a total that the server computes otherwise as an error and stops sending', async () => {
    const server = serverOf(scheme);
    await mount();
    server.computes = 151;
    await choose(finish('f2'));
    expect(now().sync.mismatch).toEqual({ hereCents: 150, thereCents: 151 });
    const asked = server.asked.length;
    await choose(crown('c3'));
    expect(server.asked).toHaveLength(asked);
  });
});
