import { spawn } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { closePool, withScope } from '@/db/client';
import { editions, surveys } from '@/db/schema';
import { cloneTestDatabase, type TestDatabase } from '@/lib/local/test-database';
import { createJob } from '@/lib/services/job/create';
import { costs, edition, SURVEY } from './kitchen-scene';
import { addContractor, valueOf, type Contractor } from './scene';

let database: TestDatabase;
let tern: Contractor;
const folder = mkdtempSync(path.join(tmpdir(), 'import-'));

beforeAll(async () => {
  database = await cloneTestDatabase();
  tern = await addContractor('tern-hollow');
  valueOf(await createJob(tern.owner, { name: 'Sorrel Lane', address: '14 Sorrel Lane' }));
});

afterAll(async () => {
  await closePool();
  await database.drop();
  rmSync(folder, { recursive: true, force: true });
});

function file(name: string, content: unknown): string {
  const place = path.join(folder, name);
  writeFileSync(place, typeof content === 'string' ? content : JSON.stringify(content));
  return place;
}

/** Runs the command as a person would, with the database of this test. */
function run(...args: string[]): Promise<{ code: number | null; said: string; faults: string }> {
  return new Promise((resolve, reject) => {
    const child = spawn(process.execPath, ['--import', 'tsx', 'lib/cli/import.ts', ...args], {
      env: process.env,
      stdio: ['ignore', 'pipe', 'pipe'],
    });
    let said = '';
    let faults = '';
    child.stdout.on('data', (bytes: Buffer) => (said += bytes.toString()));
    child.stderr.on('data', (bytes: Buffer) => (faults += bytes.toString()));
    child.once('error', reject);
    child.once('exit', (code) => resolve({ code, said, faults }));
  });
}

const held = () =>
  withScope(tern.worker, async (tx) => ({
    surveys: await tx.$count(surveys),
    editions: await tx.$count(editions),
  }));

const survey = (place: string) => run('survey', '--company', 'tern-hollow', '--job', '1', place);

describe('the import command', () => {
  it('brings a survey and an edition in and says what it stored', async () => {
    const stored = await survey(file('survey.json', SURVEY));
    expect(stored).toMatchObject({ code: 0, faults: '' });
    expect(stored.said).toMatch(/^Survey 1 of job 1 is stored \([0-9a-f]{64}\)\.\n$/);
    const book = file('edition.json', { edition: edition(1), costs: costs(1) });
    const published = await run('edition', '--company', 'tern-hollow', book);
    expect(published).toMatchObject({ code: 0, faults: '' });
    expect(published.said).toMatch(/^Edition 1 is published/);
    expect(await held()).toEqual({ surveys: 1, editions: 1 });
  });

  it('lists every fault of a bad file by path, ends with code 2 and stores nothing', async () => {
    const before = await held();
    const [cabinet] = SURVEY.cabinets;
    const bad = { ...SURVEY, kitchen: 7, cabinets: [{ ...cabinet, width: 'wide', zone: 'attic' }] };
    const refused = await survey(file('bad.json', bad));
    expect(refused).toMatchObject({ code: 2, said: '' });
    for (const place of ['kitchen', 'cabinets.0.width', 'cabinets.0.zone']) {
      expect(refused.faults).toMatch(new RegExp(`^  ${place.replaceAll('.', '\\.')}: `, 'm'));
    }
    expect(await held()).toEqual(before);
  });

  it.each([
    ['text that is not JSON', () => survey(file('text.json', '{')), 'is not JSON'],
    ['a file that is not there', () => survey(path.join(folder, 'none.json')), 'cannot be read'],
    [
      'a company that is not there',
      () => run('survey', '--company', 'nobody', '--job', '1', file('s.json', SURVEY)),
      'no company',
    ],
    [
      'a job that is not there',
      () => run('survey', '--company', 'tern-hollow', '--job', '77', file('s.json', SURVEY)),
      'no job 77',
    ],
    [
      'somebody who is not of the staff',
      () =>
        run(
          'survey',
          '--company',
          'tern-hollow',
          '--job',
          '1',
          '--as',
          'dov@quillback.example',
          file('s.json', SURVEY),
        ),
      'not of the staff',
    ],
    ['no file', () => run('survey', '--company', 'tern-hollow', '--job', '1'), 'Usage'],
    ['an unknown kind', () => run('kitchen', '--company', 'tern-hollow', file('s.json', SURVEY)), 'Usage'],
    [
      'an unknown option',
      () => run('survey', '--contractor', 'tern-hollow', file('s.json', SURVEY)),
      '--contractor',
    ],
  ])('given %s says so and ends with code 2', async (_, attempt, words) => {
    const refused = await attempt();
    expect(refused).toMatchObject({ code: 2, said: '' });
    expect(refused.faults).toContain(words);
  });
});
