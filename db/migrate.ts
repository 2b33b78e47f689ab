import { readFileSync } from 'node:fs';
import path from 'node:path';
import { pathToFileURL } from 'node:url';
import { drizzle } from 'drizzle-orm/postgres-js';
import { migrate as runMigrations } from 'drizzle-orm/postgres-js/migrator';
import postgres from 'postgres';
import { z } from 'zod';
import { FAILED_QUEUE, QUEUES, RETRY } from '@/lib/contracts/jobs';

const folder = path.join(__dirname, 'migrations');
const journalShape = z.object({ entries: z.array(z.object({ tag: z.string() })) });

/** Any number that nothing else in this database locks. */
const LOCK = 7_340_183;

/**
 * Brings a database to the present schema, as its owner, and makes the queues that jobs are put in. Any number of
 * processes may ask at once: they take turns, and those that find nothing to do answer the same. Returns how many
 * migrations the database holds.
 */
export async function migrate(ownerUrl: string): Promise<number> {
  // One connection, because the lock belongs to it.
  const client = postgres(ownerUrl, { max: 1, onnotice: () => undefined });
  try {
    await client`select pg_advisory_lock(${LOCK})`;
    await runMigrations(drizzle(client), { migrationsFolder: folder });
    const journal = journalShape.parse(
      JSON.parse(readFileSync(path.join(folder, 'meta', '_journal.json'), 'utf8')),
    );
    const [row] = await client`select count(*)::int as applied from drizzle.__drizzle_migrations`;
    const applied = z.object({ applied: z.number() }).parse(row).applied;
    if (applied !== journal.entries.length) {
      throw new Error(
        `The database holds ${applied} migrations, this program knows ${journal.entries.length}. It was migrated by another version.`,
      );
    }
    await ensureQueues(client);
    return applied;
  } finally {
    await client.end({ timeout: 5 });
  }
}

async function ensureQueues(client: postgres.Sql): Promise<void> {
  const plain = { policy: 'standard', retryLimit: 0 };
  await client`select pgboss.create_queue(${FAILED_QUEUE}, ${JSON.stringify(plain)}::text::json)`;
  const options = {
    policy: 'standard',
    retryLimit: RETRY.limit,
    retryDelay: RETRY.delaySeconds,
    retryBackoff: true,
    deadLetter: FAILED_QUEUE,
  };
  for (const queue of QUEUES) {
    await client`select pgboss.create_queue(${queue}, ${JSON.stringify(options)}::text::json)`;
  }
}

async function main(): Promise<void> {
  const url = process.env.DATABASE_OWNER_URL;
  if (!url) {
    console.error('DATABASE_OWNER_URL is not set. It names the database and the role that owns its tables.');
    process.exit(1);
  }
  const applied = await migrate(url);
  console.log(`${applied} migrations in place`);
}

if (process.argv[1] && pathToFileURL(process.argv[1]).href === pathToFileURL(__filename).href) {
  main().catch((error: unknown) => {
    const cause = error instanceof Error && error.cause instanceof Error ? `\n${error.cause.message}` : '';
    console.error(`The database could not be migrated.\n${String(error)}${cause}`);
    process.exit(1);
  });
}
