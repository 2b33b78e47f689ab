import { and, eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { closePool, withScope } from '@/db/client';
import { audit, draws, jobs, ledger } from '@/db/schema';
import type { DrawState, JobStage } from '@/lib/contracts/states';
import { cloneTestDatabase, type TestDatabase } from '@/lib/local/test-database';
import { createJob } from '@/lib/services/job/create';
import { findJobByNumber } from '@/lib/services/job/find-by-number';
import { listJobs } from '@/lib/services/job/list';
import { moveJobStage } from '@/lib/services/job/move-stage';
import { readJob } from '@/lib/services/job/read';
import { sendInvitation } from '@/lib/services/invitation/send';
import { addContractor, addHousehold, codeOf, valueOf, type Contractor, type Household } from './scene';

let database: TestDatabase;
let tern: Contractor;
let quill: Contractor;
let lane: Household;
let race: Household;

beforeAll(async () => {
  database = await cloneTestDatabase();
  tern = await addContractor('tern-hollow');
  quill = await addContractor('quillback');
  lane = await addHousehold(tern);
  race = await addHousehold(tern);
});

afterAll(async () => {
  await closePool();
  await database.drop();
});

const at = (jobId: string) => and(eq(jobs.companyId, tern.companyId), eq(jobs.id, jobId));
const setStage = (jobId: string, stage: JobStage) =>
  withScope(tern.worker, (tx) => tx.update(jobs).set({ stage }).where(at(jobId)));

async function addDraws(jobId: string, first: DrawState): Promise<void> {
  await withScope(tern.worker, (tx) =>
    tx.insert(draws).values(
      (['signing', 'materialsIn', 'installing', 'walkThrough'] as const).map((due, index) => ({
        companyId: tern.companyId,
        jobId,
        number: index + 1,
        label: due,
        due,
        amountCents: 100_00,
        state: index === 0 ? first : ('planned' as const),
      })),
    ),
  );
}

const statesOf = (jobId: string) =>
  withScope(tern.worker, async (tx) => {
    const rows = await tx.select().from(draws).where(eq(draws.jobId, jobId)).orderBy(draws.number);
    return rows.map((row) => row.state);
  });

describe('a job', () => {
  it('opened by staff gets the company’s next number, also when ten are opened at once', async () => {
    const own = await addContractor('reedmace');
    const opened = await Promise.all(
      Array.from({ length: 10 }, (_, n) => createJob(own.seller, { name: `Job ${n}`, address: 'Lane' })),
    );
    const numbers = opened.map((one) => valueOf(one).number).sort((a, b) => a - b);
    expect(numbers).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9, 10]);
    expect(valueOf(await createJob(own.owner, { name: 'Next', address: 'Lane' }))).toMatchObject({
      number: 11,
      stage: 'measured',
      salesperson: { id: own.owner.personId },
    });
    const ofOther = { name: 'x', address: 'y', salespersonId: tern.seller.personId };
    expect(codeOf(await createJob(own.owner, ofOther))).toBe('notFound');
    expect(codeOf(await createJob(own.owner, { name: ' ', address: '' }))).toBe('invalid');
  });

  it('is found by its household and its staff; another household and another company get notFound', async () => {
    const which = { jobId: lane.jobId };
    for (const actor of [lane.guest, tern.owner, tern.seller]) {
      expect(valueOf(await readJob(actor, which)).id).toBe(lane.jobId);
    }
    for (const stranger of [race.guest, quill.owner, quill.seller]) {
      expect(codeOf(await readJob(stranger, which))).toBe('notFound');
    }
    expect(codeOf(await readJob(tern.owner, { jobId: 'x' }))).toBe('notFound');
  });

  it('is opened, listed and moved by staff of its company alone', async () => {
    const move = { jobId: lane.jobId, to: 'choosing' };
    expect(codeOf(await createJob(lane.guest, { name: 'x', address: 'y' }))).toBe('notAllowed');
    expect(codeOf(await listJobs(lane.guest))).toBe('notAllowed');
    expect(codeOf(await moveJobStage(lane.guest, move))).toBe('notAllowed');
    expect(codeOf(await moveJobStage(quill.owner, move))).toBe('notFound');
    expect(codeOf(await findJobByNumber(quill.owner, 9999))).toBe('notFound');
    const own = valueOf(await listJobs(tern.owner)).map((job) => job.id);
    expect(own.sort()).toEqual([lane.jobId, race.jobId].sort());
    expect(valueOf(await listJobs(quill.owner))).toEqual([]);
  });
});

describe('stages', () => {
  it('follow each other; asked twice, the second changes nothing', async () => {
    const { jobId } = await addHousehold(tern);
    expect(codeOf(await moveJobStage(tern.owner, { jobId, to: 'installing' }))).toBe('conflict');
    expect(valueOf(await moveJobStage(tern.owner, { jobId, to: 'choosing' })).stage).toBe('choosing');
    expect(valueOf(await moveJobStage(tern.owner, { jobId, to: 'choosing' })).stage).toBe('choosing');
    const rows = await withScope(tern.worker, (tx) => tx.select().from(audit).where(eq(audit.jobId, jobId)));
    expect(rows.map((row) => row.verb)).toEqual(['job.moveStage']);
    expect(codeOf(await moveJobStage(tern.owner, { jobId, to: 'signed' }))).toBe('conflict');
    expect(codeOf(await moveJobStage(tern.owner, { jobId, to: 'elsewhere' }))).toBe('invalid');
  });

  it('the shop gets nothing before the first payment has been received', async () => {
    const { jobId } = await addHousehold(tern);
    await setStage(jobId, 'signed');
    expect(codeOf(await moveJobStage(tern.seller, { jobId, to: 'released' }))).toBe('conflict');
    await addDraws(jobId, 'processing');
    expect(codeOf(await moveJobStage(tern.seller, { jobId, to: 'released' }))).toBe('conflict');
    await withScope(tern.worker, (tx) =>
      tx
        .update(draws)
        .set({ state: 'paid' })
        .where(and(eq(draws.jobId, jobId), eq(draws.number, 1))),
    );
    expect(valueOf(await moveJobStage(tern.seller, { jobId, to: 'released' })).stage).toBe('released');
  });

  it('make the payments due that fall due there, and no others', async () => {
    const { jobId } = await addHousehold(tern);
    await setStage(jobId, 'released');
    await addDraws(jobId, 'paid');
    await moveJobStage(tern.owner, { jobId, to: 'materialsIn' });
    expect(await statesOf(jobId)).toEqual(['paid', 'due', 'planned', 'planned']);
    await moveJobStage(tern.owner, { jobId, to: 'installing' });
    expect(await statesOf(jobId)).toEqual(['paid', 'due', 'due', 'planned']);
  });
});

describe('the desk’s list', () => {
  it('says what each job waits for, what it comes to and what was paid', async () => {
    const { jobId } = await addHousehold(tern);
    const own = async () => valueOf(await listJobs(tern.owner)).find((job) => job.id === jobId);
    expect(await own()).toMatchObject({
      salesperson: tern.seller.name,
      signed: false,
      sumCents: null,
      nextStep: 'Propose a scheme and invite the household.',
    });
    await setStage(jobId, 'signed');
    await addDraws(jobId, 'due');
    expect((await own())?.nextStep).toBe('The deposit is due.');
    const entry = { companyId: tern.companyId, jobId, memo: 'm', at: new Date() };
    await withScope(tern.worker, (tx) =>
      tx.insert(ledger).values([
        { ...entry, kind: 'agreement', amountCents: 900_00, pageSequence: 1 },
        { ...entry, kind: 'changeOrder', amountCents: -50_00, pageSequence: 2 },
        { ...entry, kind: 'payment', amountCents: -300_00, externalId: 'ch_1' },
        { ...entry, kind: 'refund', amountCents: 20_00, externalId: 're_1' },
      ]),
    );
    expect(await own()).toMatchObject({ signed: true, sumCents: 850_00, paidCents: 280_00 });
  });

  it('tells an open invitation from one that nobody sent', async () => {
    const contractor = await addContractor('sedge');
    const job = valueOf(await createJob(contractor.owner, { name: 'Alder Row', address: 'Lane' }));
    await moveJobStage(contractor.owner, { jobId: job.id, to: 'choosing' });
    const nextStep = async () => valueOf(await listJobs(contractor.owner))[0]?.nextStep;
    expect(await nextStep()).toBe('Invite the household.');
    valueOf(await sendInvitation(contractor.owner, { jobId: job.id, email: 'a@b.example', name: 'A' }));
    expect(await nextStep()).toBe('The household has not opened its invitation yet.');
  });
});
