import { sql } from 'drizzle-orm';
import { drizzle, type PostgresJsDatabase } from 'drizzle-orm/postgres-js';
import postgres from 'postgres';
import type { Actor, Worker } from '@/lib/contracts/actor';
import * as schema from './schema';

export type Transaction = Parameters<Parameters<PostgresJsDatabase<typeof schema>['transaction']>[0]>[0];

/** Looks one row up by a key before anybody's scope is known. */
export interface Lookup {
  readonly kind: 'slug' | 'organization' | 'account' | 'user' | 'person' | 'invitation';
  readonly key: string;
  readonly companyId?: string;
}

export type Scope = Actor | Worker | Lookup;

// One pool per process, also across the reloads of the development server.
const holder = globalThis as { stilewrightPool?: { url: string; sql: postgres.Sql } };

function pool(): postgres.Sql {
  const url = process.env.DATABASE_URL;
  if (!url) throw new Error('DATABASE_URL is not set.');
  if (holder.stilewrightPool?.url !== url) {
    holder.stilewrightPool = { url, sql: postgres(url, { max: 10, onnotice: () => undefined }) };
  }
  return holder.stilewrightPool.sql;
}

/** Ends this process's connections; for scripts and tests. */
export async function closePool(): Promise<void> {
  const held = holder.stilewrightPool;
  delete holder.stilewrightPool;
  await held?.sql.end({ timeout: 5 });
}

/**
 * The only way to a transaction. Row-level security sees the scope for as long as `work` runs; without one it
 * shows no rows. A thrown error rolls everything back.
 */
export async function withScope<T>(scope: Scope, work: (tx: Transaction) => Promise<T>): Promise<T> {
  const db = drizzle(pool(), { schema });
  return db.transaction(async (tx) => {
    const company = scope.companyId ?? '';
    const job = scope.kind === 'guest' ? scope.jobId : '';
    const person = 'personId' in scope ? scope.personId : '';
    const key = 'key' in scope ? scope.key : '';
    await tx.execute(sql`select set_config('app.kind', ${scope.kind}, true), set_config('app.company', ${company}, true),
      set_config('app.job', ${job}, true), set_config('app.person', ${person}, true), set_config('app.key', ${key}, true)`);
    return work(tx);
  });
}
