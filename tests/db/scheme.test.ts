import { and, asc, eq } from 'drizzle-orm';
import { afterAll, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest';
import { closePool, withScope } from '@/db/client';
import { editionCosts, jobs, schemeHistory, schemes, surveys } from '@/db/schema';
import type { Actor } from '@/lib/contracts/actor';
import type { Result } from '@/lib/contracts/result';
import { schemeConflictShape, type SchemeView } from '@/lib/contracts/scheme';
import { applyChange } from '@/lib/engine/choices';
import { takeoff } from '@/lib/engine/takeoff';
import type { ChoiceChange, Choices } from '@/lib/engine/types';
import { cloneTestDatabase, type TestDatabase } from '@/lib/local/test-database';
import { publishEdition } from '@/lib/services/edition/publish';
import { createJob } from '@/lib/services/job/create';
import { readJob } from '@/lib/services/job/read';
import { changeScheme } from '@/lib/services/scheme/change';
import { createScheme } from '@/lib/services/scheme/create';
import { discardScheme } from '@/lib/services/scheme/discard';
import { duplicateScheme } from '@/lib/services/scheme/duplicate';
import { listSchemes } from '@/lib/services/scheme/list';
import { readKitchen } from '@/lib/services/scheme/read-kitchen';
import { readScheme } from '@/lib/services/scheme/read';
import { importSurvey } from '@/lib/services/survey/import';
import { CHOICES, costs, edition, SURVEY } from './kitchen-scene';
import {
  addContractor,
  addHousehold,
  codeOf,
  SETTINGS,
  valueOf,
  type Contractor,
  type Household,
} from './scene';
import { termsOf } from '@/lib/contracts/terms';

let database: TestDatabase;
let tern: Contractor;
let quill: Contractor;
let lane: Household;
let race: Household;
let scheme: SchemeView;

const terms = termsOf(SETTINGS);
const totalOf = (choices: Choices) => takeoff(SURVEY, edition(1), choices, terms).total;
const to = (option: string, key: 'style' | 'species' | 'finish' | 'crown' = 'finish'): ChoiceChange => ({
  key,
  zone: 'kitchen',
  option,
});

beforeAll(async () => {
  database = await cloneTestDatabase();
  tern = await addContractor('tern-hollow');
  quill = await addContractor('quillback');
  valueOf(await publishEdition(tern.owner, { edition: edition(1), costs: costs(1) }));
  valueOf(await publishEdition(quill.owner, { edition: edition(1), costs: costs(1) }));
});

/** A household whose job has a survey, an edition and the contractor's proposal. */
async function addChoosing(contractor: Contractor): Promise<{ household: Household; scheme: SchemeView }> {
  const household = await addHousehold(contractor);
  const { jobId } = household;
  await withScope(contractor.worker, async (tx) => {
    const [row] = await tx.query.editions.findMany({ limit: 1 });
    await tx
      .update(jobs)
      .set({ editionId: row?.id })
      .where(and(eq(jobs.companyId, contractor.companyId), eq(jobs.id, jobId)));
  });
  valueOf(await importSurvey(contractor.seller, { jobId, survey: SURVEY }));
  const proposal = { jobId, name: 'Proposed', choices: CHOICES, decided: ['style'] };
  return { household, scheme: valueOf(await createScheme(contractor.seller, proposal)) };
}

beforeEach(async () => {
  ({ household: lane, scheme } = await addChoosing(tern));
  ({ household: race } = await addChoosing(tern));
});

afterAll(async () => {
  await closePool();
  await database.drop();
});

const change = (actor: Actor, changes: readonly ChoiceChange[], more: Record<string, unknown> = {}) => {
  const total = () => totalOf(changes.reduce(applyChange, scheme.choices));
  return changeScheme(actor, {
    jobId: lane.jobId,
    schemeId: scheme.id,
    version: scheme.version,
    changes,
    totalCents: 'totalCents' in more ? more.totalCents : total(),
    ...more,
  });
};

const conflictOf = (result: Result<unknown>) => {
  expect(codeOf(result)).toBe('conflict');
  return schemeConflictShape.parse(result.ok ? null : result.fault.detail);
};

const stored = () =>
  withScope(tern.worker, async (tx) => {
    const [row] = await tx.select().from(schemes).where(eq(schemes.id, scheme.id));
    const history = await tx
      .select()
      .from(schemeHistory)
      .where(eq(schemeHistory.schemeId, scheme.id))
      .orderBy(asc(schemeHistory.version));
    return { row, history };
  });

describe('a proposal', () => {
  it('carries the computed total, and the first sets the job’s first estimate for good', async () => {
    expect(scheme).toMatchObject({ letter: 'A', version: 1, proposed: true, totalCents: totalOf(CHOICES) });
    const dearer = { ...CHOICES, kitchen: { ...CHOICES.kitchen, finish: 'paint-3' } };
    const second = { jobId: lane.jobId, name: 'Second', choices: dearer };
    const view = valueOf(await createScheme(lane.guest, second));
    expect(view).toMatchObject({ letter: 'B', proposed: false, totalCents: totalOf(dearer) });
    const kitchen = valueOf(await readKitchen(lane.guest, { jobId: lane.jobId }));
    expect(kitchen.baselineCents).toBe(totalOf(CHOICES));
  });

  it('needs a survey and an edition first, and options that the edition has and that go together', async () => {
    const own = await addContractor('bare');
    const bare = valueOf(await createJob(own.owner, { name: 'Bare', address: 'Lane' }));
    const proposal = { jobId: bare.id, name: 'x', choices: CHOICES };
    expect(codeOf(await createScheme(own.owner, proposal))).toBe('conflict');
    const pick = (more: Partial<Choices['kitchen']>) => ({
      jobId: lane.jobId,
      name: 'x',
      choices: { ...CHOICES, kitchen: { ...CHOICES.kitchen, ...more } },
    });
    expect(codeOf(await createScheme(tern.owner, pick({ pull: 'golden' })))).toBe('invalid');
    expect(codeOf(await createScheme(tern.owner, pick({ style: 'plank' })))).toBe('invalid');
    expect(codeOf(await createScheme(tern.owner, pick({ style: 'plank', species: 'oak' })))).toBe('ok');
  });
});

describe('a change', () => {
  it('is stored with the next version, its history and what was decided', async () => {
    const more = { decided: ['style', 'finish'], unsure: ['crown'] };
    const view = valueOf(await change(lane.guest, [to('paint-3')], more));
    expect(view).toMatchObject({ version: 2, ...more });
    expect(view.choices.kitchen.finish).toBe('paint-3');
    expect(view.totalCents).toBeGreaterThan(scheme.totalCents);
    const { row, history } = await stored();
    expect(row?.totalCents).toBe(view.totalCents);
    expect(history.map((one) => [one.version, one.change, one.personId, one.totalCents])).toEqual([
      [1, [], tern.seller.personId, scheme.totalCents],
      [2, [to('paint-3')], lane.guest.personId, view.totalCents],
    ]);
  });

  it('made on an old version is refused with the scheme as it stands', async () => {
    const first = valueOf(await change(tern.seller, [to('paint-3')]));
    const late = conflictOf(await change(lane.guest, [to('cove', 'crown')]));
    expect(late).toEqual(first);
    expect((await stored()).history).toHaveLength(2);
  });

  it('of which ten come at once on one version is stored once', async () => {
    const answers = await Promise.all(Array.from({ length: 10 }, () => change(lane.guest, [to('paint-3')])));
    const codes = answers.map(codeOf).sort();
    expect(codes).toEqual([...Array(9).fill('conflict'), 'ok']);
    expect((await stored()).history).toHaveLength(2);
  });

  it('with another total than the computation’s is logged and refused with both, and nothing is stored', async () => {
    const log = vi.spyOn(console, 'error').mockImplementation(() => undefined);
    const right = totalOf(applyChange(scheme.choices, to('paint-3')));
    const refused = conflictOf(await change(lane.guest, [to('paint-3')], { totalCents: right - 1 }));
    expect(refused.computedCents).toBe(right);
    expect(refused.version).toBe(1);
    expect(String(log.mock.calls[0]?.[0])).toContain(`${right - 1} cents`);
    log.mockRestore();
    expect((await stored()).row?.version).toBe(1);
  });

  it('to what the edition does not have, or what does not go together, is refused', async () => {
    const whatever = { totalCents: 1 };
    expect(codeOf(await change(lane.guest, [to('gold')], whatever))).toBe('invalid');
    expect(codeOf(await change(lane.guest, [to('plank', 'style')], whatever))).toBe('invalid');
    expect(codeOf(await change(lane.guest, [to('plank', 'style'), to('oak', 'species')]))).toBe('ok');
  });

  it('of unknown shape is refused by path', async () => {
    const refused = await change(lane.guest, [], {
      changes: [{ key: 'price', zone: 'kitchen', option: '0' }],
    });
    expect(codeOf(refused)).toBe('invalid');
    expect(refused.ok ? [] : refused.fault.faults?.map((fault) => fault.path)).toEqual(['changes.0']);
  });
});

describe('another household’s and another contractor’s schemes are not found', () => {
  it('by any verb', async () => {
    const at = () => ({ jobId: lane.jobId, schemeId: scheme.id });
    for (const stranger of [race.guest, quill.owner, quill.seller]) {
      expect(codeOf(await change(stranger, [to('paint-3')]))).toBe('notFound');
      expect(codeOf(await readScheme(stranger, at()))).toBe('notFound');
      expect(codeOf(await duplicateScheme(stranger, at()))).toBe('notFound');
      expect(codeOf(await discardScheme(stranger, at()))).toBe('notFound');
      expect(codeOf(await listSchemes(stranger, at()))).toBe('notFound');
      expect(codeOf(await readKitchen(stranger, at()))).toBe('notFound');
      const other = { jobId: lane.jobId, name: 'x', choices: CHOICES };
      expect(codeOf(await createScheme(stranger, other))).toBe('notFound');
    }
    // Nor by naming one's own job beside it.
    const mixed = { jobId: race.jobId, schemeId: scheme.id };
    expect(codeOf(await readScheme(race.guest, mixed))).toBe('notFound');
    expect(codeOf(await change(race.guest, [to('paint-3')], mixed))).toBe('notFound');
    expect((await stored()).row?.version).toBe(1);
  });
});

describe('letters', () => {
  it('go from A to F, six at most, and are free again when a scheme is thrown away', async () => {
    const at = { jobId: lane.jobId, schemeId: scheme.id };
    const copies = await Promise.all(Array.from({ length: 2 }, () => duplicateScheme(tern.owner, at)));
    expect(copies.map(codeOf)).toEqual(['ok', 'ok']);
    const letters = async () => valueOf(await listSchemes(lane.guest, at)).map((one) => one.letter);
    while ((await letters()).length < 6) valueOf(await duplicateScheme(lane.guest, at));
    expect(await letters()).toEqual(['A', 'B', 'C', 'D', 'E', 'F']);
    expect(codeOf(await duplicateScheme(lane.guest, at))).toBe('conflict');
    const third = valueOf(await listSchemes(lane.guest, at))[2];
    valueOf(await discardScheme(lane.guest, { jobId: lane.jobId, schemeId: third?.id }));
    expect(valueOf(await duplicateScheme(lane.guest, at))).toMatchObject({ letter: 'C', name: 'Scheme C' });
  });

  it('the last scheme of a job cannot be thrown away', async () => {
    const at = { jobId: lane.jobId, schemeId: scheme.id };
    expect(codeOf(await discardScheme(lane.guest, at))).toBe('conflict');
  });
});

describe('the kitchen', () => {
  it('is read at once, without anything of what it costs the contractor', async () => {
    const kitchen = valueOf(await readKitchen(lane.guest, { jobId: lane.jobId }));
    expect(kitchen).toMatchObject({
      role: 'homeowner',
      company: { slug: 'tern-hollow', phone: '(555) 010-0100' },
      salesperson: { name: tern.seller.name },
      sealed: null,
      survey: SURVEY,
      edition: edition(1),
      terms,
    });
    expect(kitchen.schemes.map((one) => one.id)).toEqual([scheme.id]);
    const words = JSON.stringify(kitchen);
    for (const secret of ['costShare', 'acct_', 'org_', 'salespersonLimitCents']) {
      expect(words).not.toContain(secret);
    }
    const seen = await withScope(lane.guest, (tx) => tx.select().from(editionCosts));
    expect(seen).toEqual([]);
  });
});

describe('a survey', () => {
  const bad = { ...SURVEY, kitchen: 7, cabinets: [{ ...SURVEY.cabinets[0], width: 'wide' }] };

  it('with faults is refused with every one by path, and nothing is stored', async () => {
    const before = await withScope(tern.worker, (tx) => tx.$count(surveys));
    const refused = await importSurvey(tern.seller, { jobId: lane.jobId, survey: bad });
    expect(codeOf(refused)).toBe('invalid');
    const paths = refused.ok ? [] : (refused.fault.faults ?? []).map((fault) => fault.path);
    expect(paths).toEqual(expect.arrayContaining(['kitchen', 'cabinets.0.width']));
    expect(await withScope(tern.worker, (tx) => tx.$count(surveys))).toBe(before);
  });

  it('comes from staff of the company alone, and not once the job is signed', async () => {
    const ask = { jobId: lane.jobId, survey: SURVEY };
    expect(codeOf(await importSurvey(lane.guest, ask))).toBe('notAllowed');
    expect(codeOf(await importSurvey(quill.owner, ask))).toBe('notFound');
    await withScope(tern.worker, (tx) =>
      tx.update(jobs).set({ stage: 'signed' }).where(eq(jobs.id, lane.jobId)),
    );
    expect(codeOf(await importSurvey(tern.owner, ask))).toBe('conflict');
  });

  it('measured anew is the next version, and the schemes come to what it makes them', async () => {
    const [cabinet] = SURVEY.cabinets;
    const second = { ...SURVEY, measuredOn: '2026-11-09', cabinets: cabinet ? [cabinet] : [] };
    const answer = valueOf(await importSurvey(tern.seller, { jobId: lane.jobId, survey: second }));
    expect(answer.number).toBe(2);
    const kitchen = valueOf(await readKitchen(lane.guest, { jobId: lane.jobId }));
    expect(kitchen.survey.measuredOn).toBe('2026-11-09');
    expect(kitchen.schemes[0]?.totalCents).toBe(takeoff(second, edition(1), CHOICES, terms).total);
  });
});

describe('an edition', () => {
  it('is the owner’s to publish, in order; open jobs keep theirs, and one that has none gets it', async () => {
    const own = await addContractor(`reedmace-${lane.jobId.slice(0, 8)}`);
    const publish = (number: number, actor: Actor = own.owner) =>
      publishEdition(actor, { edition: edition(number), costs: costs(number) });
    expect(codeOf(await publish(1, own.seller))).toBe('notAllowed');
    expect(codeOf(await publish(2))).toBe('invalid');
    const bare = valueOf(await createJob(own.owner, { name: 'Bare', address: 'Lane' }));
    const { editionId } = valueOf(await publish(1));
    expect(valueOf(await readJob(own.owner, { jobId: bare.id })).editionId).toBe(editionId);
    const before = valueOf(await createJob(own.owner, { name: 'Before', address: 'Lane' }));
    valueOf(await publish(2));
    const after = valueOf(await createJob(own.owner, { name: 'After', address: 'Lane' }));
    expect(before.editionId).toBe(editionId);
    expect(after.editionId).not.toBe(editionId);
    const books = await withScope(own.worker, (tx) => tx.select().from(editionCosts));
    expect(books).toHaveLength(2);
  });

  it('with faults is refused with every one by path, and nothing is stored', async () => {
    const own = await addContractor(`sedge-${lane.jobId.slice(0, 8)}`);
    const broken = { ...edition(1), styles: [{ ...edition(1).styles[0], price: 'dear' }], version: 9 };
    const refused = await publishEdition(own.owner, { edition: broken, costs: costs(1) });
    const paths = refused.ok ? [] : (refused.fault.faults ?? []).map((fault) => fault.path);
    expect(paths).toEqual(expect.arrayContaining(['edition.version', 'edition.styles.0.price']));
    expect(await withScope(own.worker, (tx) => tx.query.editions.findMany())).toEqual([]);
  });
});
