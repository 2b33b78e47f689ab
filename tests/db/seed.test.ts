import { spawn } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import postgres from 'postgres';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { closePool, withScope } from '@/db/client';
import { HOMEOWNERS, STAFF } from '@/db/seed/demo';
import type { Worker } from '@/lib/contracts/actor';
import { startClerkFake } from '@/lib/local/clerk/server';
import { generateSecrets } from '@/lib/local/settings';
import { startStripeFake } from '@/lib/local/stripe/server';
import { cloneTestDatabase, type TestDatabase } from '@/lib/local/test-database';
import { findCompanyBySlug } from '@/lib/services/company/find-by-slug';
import { findMember } from '@/lib/services/person/find-member';

let database: TestDatabase;
let owner: postgres.Sql;
let clerk: Awaited<ReturnType<typeof startClerkFake>>;
let stripe: Awaited<ReturnType<typeof startStripeFake>>;
const folder = mkdtempSync(path.join(tmpdir(), 'seed-'));

beforeAll(async () => {
  database = await cloneTestDatabase();
  owner = postgres(database.ownerUrl, { max: 1 });
  const secrets = generateSecrets().clerk;
  clerk = await startClerkFake({
    port: 0,
    stateFile: path.join(folder, 'clerk.json'),
    publishableKey: secrets.publishableKey,
    secretKey: process.env.CLERK_SECRET_KEY ?? '',
    privateKeyPem: secrets.privateKeyPem,
    webhookUrl: '',
    webhookSecret: secrets.webhookSecret,
    smtpUrl: 'smtp://127.0.0.1:9',
    mailDomain: 'mail.example',
    webOrigin: process.env.APP_ORIGIN ?? '',
  });
  stripe = await startStripeFake({
    port: 0,
    stateFile: path.join(folder, 'stripe.json'),
    secretKey: process.env.STRIPE_SECRET_KEY ?? '',
    publishableKey: process.env.STRIPE_PUBLISHABLE_KEY ?? '',
    webhookUrl: 'http://127.0.0.1:9',
    webhookSecret: process.env.STRIPE_WEBHOOK_SECRET ?? '',
    webOrigin: process.env.APP_ORIGIN ?? '',
  });
}, 60_000);

afterAll(async () => {
  await closePool();
  await owner.end();
  await clerk.stop();
  await stripe.stop();
  await database.drop();
  rmSync(folder, { recursive: true, force: true });
});

function seed(): Promise<{ code: number | null; said: string }> {
  return new Promise((resolve, reject) => {
    const child = spawn(process.execPath, ['--import', 'tsx', 'db/seed/seed.ts'], {
      env: { ...process.env, CLERK_API_URL: clerk.origin, STRIPE_API_BASE: stripe.origin },
      stdio: ['ignore', 'pipe', 'inherit'],
    });
    let said = '';
    child.stdout.on('data', (bytes: Buffer) => (said += bytes.toString()));
    child.once('error', reject);
    child.once('exit', (code) => resolve({ code, said }));
  });
}

/** How many rows each table of each company holds, as its worker sees them, and how many mails wait. */
async function held() {
  const counts: Record<string, unknown> = {};
  for (const slug of ['tern-hollow', 'quillback']) {
    const company = await findCompanyBySlug(slug);
    const worker: Worker = { kind: 'worker', companyId: company?.id ?? '' };
    counts[slug] = await withScope(worker, async (tx) => ({
      jobs: (await tx.query.jobs.findMany({ orderBy: (job, { asc }) => asc(job.number) })).map(
        ({ number, name, stage }) => [number, name, stage],
      ),
      invitations: (await tx.query.invitations.findMany()).map(({ email }) => email).sort(),
      people: (await tx.query.people.findMany()).map(({ email }) => email).sort(),
      schemes: (await tx.query.schemes.findMany()).length,
      pages: (await tx.query.pages.findMany()).length,
      ledger: (await tx.query.ledger.findMany()).length,
      audit: (await tx.query.audit.findMany()).length,
    }));
  }
  const [mails] = await owner`select count(*)::int as waiting from pgboss.job where name = 'mail'`;
  return { ...counts, mails: mails?.waiting };
}

describe('the demo', () => {
  it('put in twice is there once, and each time says who can sign in', async () => {
    const first = await seed();
    expect(first.code).toBe(0);
    for (const { name, email } of [...Object.values(STAFF), HOMEOWNERS.mara, HOMEOWNERS.teo]) {
      expect(first.said).toMatch(new RegExp(`^ *${name}.*${email}`, 'm'));
    }
    const before = await held();
    expect(await seed()).toEqual(first);
    expect(await held()).toEqual(before);
  });

  it('has Mill Race released with an approved change order and one that waits for the owner', async () => {
    const company = await findCompanyBySlug('tern-hollow');
    const worker: Worker = { kind: 'worker', companyId: company?.id ?? '' };
    await withScope(worker, async (tx) => {
      const job = await tx.query.jobs.findFirst({ where: (row, { eq }) => eq(row.name, 'Mill Race') });
      expect(job?.stage).toBe('released');
      const orders = await tx.query.changeOrders.findMany({ orderBy: (row, { asc }) => asc(row.number) });
      expect(orders.map(({ number, state }) => [number, state])).toEqual([
        [1, 'approved'],
        [2, 'signed'],
      ]);
      const pages = await tx.query.pages.findMany({ orderBy: (row, { asc }) => asc(row.sequence) });
      expect(pages.map(({ kind }) => kind)).toEqual(['agreement', 'changeOrder']);
      const draws = await tx.query.draws.findMany({ orderBy: (row, { asc }) => asc(row.number) });
      expect(draws.map(({ state }) => state)).toEqual(['paid', 'planned', 'planned', 'planned']);
    });
  });

  it('keeps the staff of each contractor apart', async () => {
    const [tern, quill] = [await findCompanyBySlug('tern-hollow'), await findCompanyBySlug('quillback')];
    expect(await findMember(tern?.id ?? '', STAFF.ines.email)).toMatchObject({ role: 'owner' });
    expect(await findMember(tern?.id ?? '', STAFF.rowan.email)).toMatchObject({ role: 'salesperson' });
    expect(await findMember(quill?.id ?? '', STAFF.dov.email)).toMatchObject({ role: 'owner' });
    expect(await findMember(tern?.id ?? '', STAFF.dov.email)).toBeNull();
    expect(await findMember(quill?.id ?? '', STAFF.ines.email)).toBeNull();
  });
});
