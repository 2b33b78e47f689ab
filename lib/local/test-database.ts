import { execFile } from 'node:child_process';
import { randomBytes } from 'node:crypto';
import { existsSync } from 'node:fs';
import path from 'node:path';
import { promisify } from 'node:util';
import postgres from 'postgres';
import { plainSurroundings, programVariables } from './environment';
import { holdersOf, lock } from './holders';
import { localFolder, root } from './places';
import { ensurePostgres, type Cluster } from './postgres';
import { SetupFault } from './progress';
import { loadSettings } from './settings';
import { hashFiles } from './staleness';

const run = promisify(execFile);

const withDatabase = (url: string, database: string) => {
  const changed = new URL(url);
  changed.pathname = `/${database}`;
  return changed.toString();
};

/** Name of the migrated database that the present migrations lead to; others of that kind are outdated. */
const templateName = () =>
  `template_${hashFiles(root, ['db/migrate.ts', 'db/migrations', 'lib/contracts/jobs.ts', 'package-lock.json']).slice(0, 16)}`;

/** Migrates the template once per state of the migrations; several processes may ask at once. */
async function ensureTemplate(cluster: Cluster): Promise<string> {
  const template = templateName();
  const release = await lock(
    path.join(localFolder('test'), 'template.lock'),
    120_000,
    'Another process is still migrating the test template.',
  );
  try {
    const databases = await cluster.listDatabases();
    const alone = holdersOf(path.join(localFolder('test'), 'postgres-users')).length === 1;
    for (const database of databases) {
      const [, kind, pid] = /^(test|building)_(\d+)_/.exec(database) ?? [];
      if (kind && !existsSync(`/proc/${pid}`)) await cluster.dropDatabase(database);
      // Another run may still be copying an older template.
      if (alone && database.startsWith('template_') && database !== template)
        await cluster.dropDatabase(database);
    }
    if (databases.includes(template)) return template;
    const building = `building_${process.pid}_${randomBytes(3).toString('hex')}`;
    await cluster.createDatabase(building);
    await run(process.execPath, ['--import', 'tsx', 'db/migrate.ts'], {
      cwd: root,
      env: {
        ...plainSurroundings(process.env),
        NODE_ENV: 'development',
        DATABASE_URL: cluster.appUrl(building),
        DATABASE_OWNER_URL: cluster.ownerUrl(building),
      },
    }).catch((error: unknown) => {
      const output = error instanceof Error && 'stderr' in error ? String(error.stderr) : String(error);
      throw new SetupFault('The test database could not be migrated.', output);
    });
    await cluster.renameDatabase(building, template);
    return template;
  } finally {
    release();
  }
}

/**
 * For the test runner, once per run: starts the test cluster unless an address is given, and fills `process.env`
 * with all that the program reads. No test ever sees a real service's key: those are replaced.
 * `TEST_DATABASE_OWNER_URL` and `TEST_DATABASE_APP_URL` name the migrated template database.
 */
export default async function setUpTestDatabase(): Promise<() => Promise<void>> {
  const cluster = await ensurePostgres({ name: 'test' });
  const template = await ensureTemplate(cluster);
  const settings = await loadSettings(localFolder('test', 'database-tests'));
  const nothingReal = { databaseUrl: cluster.appUrl(template) };
  Object.assign(process.env, programVariables(settings, nothingReal, new Set(), {}), {
    TEST_DATABASE_OWNER_URL: cluster.ownerUrl(template),
    TEST_DATABASE_APP_URL: cluster.appUrl(template),
  });
  return () => cluster.stop();
}

/** A database of one test file alone. */
export interface TestDatabase {
  /** Connects as the owner of the tables, for what a test must see or prepare past row-level security. */
  readonly ownerUrl: string;
  /** Connects as the program does. */
  readonly appUrl: string;
  drop(): Promise<void>;
}

/**
 * Copies the migrated template (some tens of milliseconds) and points `DATABASE_URL` at the copy, so that
 * `withScope` works in it. Call it in `beforeAll` and `drop` in `afterAll`, after `closePool`.
 */
export async function cloneTestDatabase(): Promise<TestDatabase> {
  const templateOwner = process.env.TEST_DATABASE_OWNER_URL;
  const templateApp = process.env.TEST_DATABASE_APP_URL;
  if (!templateOwner || !templateApp)
    throw new Error('TEST_DATABASE_OWNER_URL and TEST_DATABASE_APP_URL are not set.');
  const template = new URL(templateOwner).pathname.slice(1);
  const name = `test_${process.pid}_${randomBytes(4).toString('hex')}`;
  const asOwner = async (work: (sql: postgres.Sql) => Promise<unknown>) => {
    const sql = postgres(withDatabase(templateOwner, 'postgres'), { max: 1, onnotice: () => undefined });
    try {
      await work(sql);
    } finally {
      await sql.end({ timeout: 5 });
    }
  };
  await asOwner((sql) => sql`create database ${sql(name)} template ${sql(template)}`);
  const appUrl = withDatabase(templateApp, name);
  process.env.DATABASE_URL = appUrl;
  return {
    ownerUrl: withDatabase(templateOwner, name),
    appUrl,
    drop: () => asOwner((sql) => sql`drop database if exists ${sql(name)} with (force)`),
  };
}
