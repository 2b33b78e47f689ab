import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import fc from 'fast-check';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { gannetCourt, gannetCourtProposed } from '@/db/seed/scenario/gannet-court';
import { millRace, millRaceProposed } from '@/db/seed/scenario/mill-race';
import { quillbackEdition } from '@/db/seed/scenario/edition-quillback';
import { quillbackJob, quillbackJobProposed } from '@/db/seed/scenario/quillback-job';
import { secondHousehold, secondHouseholdProposed } from '@/db/seed/scenario/second-household';
import { sorrelLane, sorrelLaneProposed } from '@/db/seed/scenario/sorrel-lane';
import { ternHollowCosts } from '@/db/seed/scenario/costs';
import { choicesShape } from '@/lib/contracts/choices';
import { editionCostsShape, parseEdition } from '@/lib/contracts/edition';
import { parseSurvey } from '@/lib/contracts/survey';
import { takeoff } from '@/lib/engine/takeoff';
import { EDITION, oneDoor, survey, TERMS } from './scene';

const copy = (value: unknown): unknown => JSON.parse(JSON.stringify(value));

/** A copy of one survey with something replaced at a path. */
function broken(at: readonly (string | number)[], value: unknown): unknown {
  const whole = copy(survey([oneDoor()]));
  let here: unknown = whole;
  for (const step of at.slice(0, -1)) here = Reflect.get(Object(here), step);
  Reflect.set(Object(here), at[at.length - 1] ?? '', value);
  return whole;
}

const faultsIn = (json: unknown): string[] => {
  const parsed = parseSurvey(json);
  return parsed.ok ? [] : parsed.faults.map((fault) => fault.path);
};

describe('surveys from outside', () => {
  it.each([
    ['Sorrel Lane', sorrelLane, sorrelLaneProposed, EDITION],
    ['Mill Race', millRace, millRaceProposed, EDITION],
    ['Gannet Court', gannetCourt, gannetCourtProposed, EDITION],
    ['the second household', secondHousehold, secondHouseholdProposed, EDITION],
    ['the second contractor’s job', quillbackJob, quillbackJobProposed, quillbackEdition],
  ] as const)(
    '%s comes in whole, closes, and nothing about it cannot be built',
    (_name, kitchen, choices, edition) => {
      expect(parseSurvey(copy(kitchen))).toEqual({ ok: true, value: kitchen });
      expect(choicesShape.parse(copy(choices))).toEqual(choices);
      const { notes, fronts } = takeoff(kitchen, edition, choices, TERMS);
      expect(notes.filter((note) => note.severity === 'cannotBeBuilt')).toEqual([]);
      expect(notes.filter((note) => note.code.startsWith('survey.'))).toEqual([]);
      expect(fronts.length).toBeGreaterThan(0);
    },
  );
  it('D2 lengths may be typed, and the text is kept by its path', () => {
    const parsed = parseSurvey(broken(['cabinets', 0, 'width'], '18"'));
    expect(parsed).toMatchObject({ ok: true, value: { typed: { 'cabinets.N-01.width': '18"' } } });
    expect(parsed.ok && parsed.value.cabinets[0]?.width).toBe(18 * 64);
  });
  it('D2 a length that cannot be read is told by path with a form that can', () => {
    const parsed = parseSurvey(broken(['cabinets', 0, 'frame', 'stileLeft'], 'one and a half'));
    expect(parsed).toMatchObject({ ok: false, faults: [{ path: 'cabinets.0.frame.stileLeft' }] });
    expect(!parsed.ok && parsed.faults[0]?.message).toContain('24 1/2');
  });
  it('A2 a frameless box is refused plainly', () => {
    const parsed = parseSurvey(broken(['cabinets', 0, 'box'], 'frameless'));
    expect(!parsed.ok && parsed.faults[0]?.message).toContain('face frame');
  });
  it('tells every fault at once, shape and references together', () => {
    const whole = copy(survey([oneDoor(), oneDoor({}, 60)], { yearBuilt: 1974 }));
    Reflect.set(Object(whole), 'yearBuilt', 'long ago');
    Reflect.set(Object(Reflect.get(Object(Reflect.get(Object(whole), 'cabinets')), 0)), 'wall', 'Q');
    expect(faultsIn(whole)).toEqual(
      expect.arrayContaining(['yearBuilt', 'cabinets.1.id', 'cabinets.0.wall']),
    );
  });
  it('tells a wrong number of members and an opening that stands twice', () => {
    const opening = { n: 1, kind: 'open', width: 400, height: 400, existing: [] };
    const layout = { split: 'row', parts: [{ opening }, { opening }], members: [] };
    expect(faultsIn(broken(['cabinets', 0, 'frame', 'layout'], layout))).toEqual(
      expect.arrayContaining([
        'cabinets.0.frame.layout.members',
        'cabinets.0.frame.layout.parts.1.opening.n',
      ]),
    );
  });
  it('tells a corner whose second leg lacks its leaf', () => {
    const whole = copy(sorrelLane);
    const cabinets: unknown = Reflect.get(Object(whole), 'cabinets');
    const corner = Array.isArray(cabinets)
      ? cabinets.findIndex((one: unknown) => Reflect.get(Object(one), 'id') === 'W-04')
      : -1;
    const its: unknown = Reflect.get(Object(Reflect.get(Object(cabinets), corner)), 'corner');
    const frameB: unknown = Reflect.get(Object(its), 'frameB');
    Reflect.set(Object(frameB), 'layout', {
      opening: { n: 2, kind: 'door', width: 672, height: 1760, existing: [] },
    });
    expect(faultsIn(whole)).toContain(`cabinets.${corner}.corner.frameB.layout`);
  });
  it('never throws, whatever it is given', () => {
    fc.assert(
      fc.property(fc.anything({ maxDepth: 4 }), (json) => {
        const parsed = parseSurvey(json);
        return !parsed.ok && parsed.faults.length > 0;
      }),
      { numRuns: 500 },
    );
  });
  it('a survey with one thing spoilt is refused by path or computed, never thrown', () => {
    const places = [
      'width',
      'height',
      'at',
      'bottom',
      'depth',
      'action',
      'tier',
      'zone',
      'wall',
      'frame',
      'left',
    ];
    fc.assert(
      fc.property(fc.constantFrom(...places), fc.jsonValue({ maxDepth: 2 }), (name, value) => {
        const parsed = parseSurvey(broken(['cabinets', 0, name], value));
        if (!parsed.ok) return parsed.faults.length > 0;
        return takeoff(parsed.value, EDITION, sorrelLaneProposed, TERMS).total >= 0;
      }),
      { numRuns: 400 },
    );
  });
});

describe('editions from outside', () => {
  const edited = (name: string, value: unknown) => {
    const whole = copy(EDITION);
    Reflect.set(Object(whole), name, value);
    const parsed = parseEdition(whole);
    return parsed.ok ? [] : parsed.faults.map((fault) => fault.path);
  };
  it('both contractors’ books come in whole', () => {
    expect(parseEdition(copy(EDITION))).toEqual({ ok: true, value: EDITION });
    expect(parseEdition(copy(quillbackEdition))).toEqual({ ok: true, value: quillbackEdition });
    expect(editionCostsShape.parse(copy(ternHollowCosts))).toEqual(ternHollowCosts);
  });
  it('H2 a hinge set made for another overlay is a fault', () => {
    const overlays = EDITION.overlays.map((one) => ({ ...one, hingeSet: 'hinge-half' }));
    expect(edited('overlays', overlays)).toEqual(['overlays.0.hingeSet', 'overlays.2.hingeSet']);
  });
  it('what points to nothing is a fault', () => {
    const boxes = EDITION.drawerBoxes.map((one) => ({ ...one, slide: 'no-such' }));
    expect(edited('drawerBoxes', boxes)).toEqual(['drawerBoxes.1.slide', 'drawerBoxes.2.slide']);
  });
  it('a cost in an edition is refused: a homeowner’s browser may hold it', () => {
    const styles = EDITION.styles.map((one, index) => (index === 0 ? { ...one, cost: 100 } : one));
    expect(edited('styles', styles)).toEqual(['styles.0']);
  });
});

describe('the command line', () => {
  let folder = '';
  const file = (name: string, json: unknown) => {
    const at = path.join(folder, name);
    writeFileSync(at, JSON.stringify(json));
    return at;
  };
  const run = (...args: string[]) =>
    spawnSync(process.execPath, ['--import', 'tsx', 'lib/cli/takeoff.ts', ...args], { encoding: 'utf8' });

  beforeAll(() => {
    folder = mkdtempSync(path.join(tmpdir(), 'takeoff-'));
  });
  afterAll(() => {
    rmSync(folder, { recursive: true });
  });

  it('prints the door order of a survey with a scheme', () => {
    const { stdout, status } = run(
      file('survey.json', sorrelLane),
      '--edition',
      file('edition.json', EDITION),
      '--scheme',
      file('scheme.json', sorrelLaneProposed),
      '--out',
      'doors',
    );
    expect(status).toBe(0);
    expect(stdout).toMatch(/W-04-1L\s+door\s+10 1\/16\s+28 1\/2\s+Square flat panel/);
  }, 30_000);
  it('ends with 2 and tells faults by path', () => {
    const { stderr, status } = run(
      file('bad.json', broken(['cabinets', 0, 'width'], 'wide')),
      '--edition',
      file('edition.json', EDITION),
    );
    expect(status).toBe(2);
    expect(stderr).toContain('cabinets.0.width');
  }, 30_000);
});
