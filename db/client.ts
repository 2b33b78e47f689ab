import { sql } from 'drizzle-orm';
import { drizzle, type PostgresJsDatabase } from 'drizzle-orm/postgres-js';
import postgres from 'postgres';
import type { Actor, Worker } from '@/lib/contracts/actor';
import * as schema from './schema';

type Database = PostgresJsDatabase<typeof schema>;
export type Transaction = Parameters<Parameters<Database['transaction']>[0]>[0];

/** Looks rows up by a key before anybody's scope is known; each kind shows what the key names and nothing else. */
export type Lookup =
  | {
      readonly kind: 'slug' | 'organization' | 'account';
      readonly key: string;
      readonly companyId?: undefined;
    }
  /** A sign-in's rows, in all companies or in one. */
  | { readonly kind: 'user'; readonly key: string; readonly companyId?: string }
  /** What a person of a company belongs to. */
  | { readonly kind: 'person'; readonly key: string; readonly companyId: string }
  /** The invitation whose token has this hash. */
  | { readonly kind: 'invitation'; readonly key: string; readonly companyId: string };

export type Scope = Actor | Worker | Lookup;

interface Pool {
  readonly url: string;
  readonly client: postgres.Sql;
  readonly database: Database;
}

// One pool per process, also across the reloads of the development server.
const holder = globalThis as { stilewrightPool?: Pool };

function pool(): Pool {
  const url = process.env.DATABASE_URL;
  if (!url) throw new Error('DATABASE_URL is not set.');
  if (holder.stilewrightPool?.url !== url) {
    const client = postgres(url, { max: 10, onnotice: () => undefined });
    holder.stilewrightPool = { url, client, database: drizzle(client, { schema }) };
  }
  return holder.stilewrightPool;
}

/** Ends this process's connections; for scripts and tests. */
export async function closePool(): Promise<void> {
  const held = holder.stilewrightPool;
  delete holder.stilewrightPool;
  await held?.client.end({ timeout: 5 });
}

/**
 * The only way to a transaction. Row-level security sees the scope for as long as `work` runs; without one it
 * shows no rows. A thrown error rolls everything back. Inside `work`, call no other `withScope`: it would be
 * another transaction on another connection.
 */
export async function withScope<T>(scope: Scope, work: (tx: Transaction) => Promise<T>): Promise<T> {
  return pool().database.transaction(async (tx) => {
    const company = scope.companyId ?? '';
    const job = scope.kind === 'guest' ? scope.jobId : '';
    const person = 'personId' in scope ? scope.personId : '';
    const key = 'key' in scope ? scope.key : '';
    await tx.execute(sql`select set_config('app.kind', ${scope.kind}, true), set_config('app.company', ${company}, true),
      set_config('app.job', ${job}, true), set_config('app.person', ${person}, true), set_config('app.key', ${key}, true)`);
    return work(tx);
  });
}

/**
 * Makes transactions about one job take turns until this one ends: whatever reads and then writes by what it read
 * holds it. A guest may, too, though the job's row is not theirs to lock.
 */
export async function lockJob(tx: Transaction, companyId: string, jobId: string): Promise<void> {
  await tx.execute(sql`select pg_advisory_xact_lock(hashtextextended(${`${companyId}/${jobId}`}, 0))`);
}
