import { sql, type SQL } from 'drizzle-orm';
import PgBoss from 'pg-boss';
import { JOB_SHAPES, QUEUES, type JobPayload, type Queue } from '@/lib/contracts/jobs';
import { environment } from './environment';

/** What `enqueue` needs of a transaction. */
interface Executes {
  execute(query: SQL): PromiseLike<Iterable<Record<string, unknown>>>;
}

/** Text with `$1`, `$2`, … as a query of the transaction it runs in. */
function toQuery(text: string, values: readonly unknown[]): SQL {
  const pieces = text.split(/\$(\d+)/).map((piece, index) => {
    if (index % 2 === 0) return sql.raw(piece);
    const value = values[Number(piece) - 1] ?? null;
    return sql`${typeof value === 'object' && value !== null ? JSON.stringify(value) : value}`;
  });
  return sql.join(pieces);
}

// Only composes statements; the connection is always the caller's.
let composer: PgBoss | undefined;
const nowhere = {
  executeSql: () => Promise.reject(new Error('A job can only be put in a queue inside a transaction.')),
};

/**
 * Puts a job in a queue as part of the transaction: it is there when the transaction commits and never otherwise.
 * Throws when the payload is not what the queue takes.
 */
export async function enqueue<Q extends Queue>(
  tx: Executes,
  queue: Q,
  payload: JobPayload<Q>,
): Promise<string> {
  const data: object = JOB_SHAPES[queue].parse(payload);
  composer ??= new PgBoss({ db: nowhere, supervise: false, schedule: false, migrate: false });
  const db = {
    executeSql: async (text: string, values: readonly unknown[]) => ({
      rows: [...(await tx.execute(toQuery(text, values)))],
    }),
  };
  const id = await composer.send(queue, data, { db });
  if (id === null) throw new Error(`There is no queue ${queue}. The database has not been migrated.`);
  return id;
}

/** What is done with a job; throwing means: again later, and at last among the failed. */
export type Handlers = {
  readonly [Q in Queue]: (payload: JobPayload<Q>, job: { readonly id: string }) => Promise<void>;
};

function parsing<Q extends Queue>(queue: Q, handlers: Handlers) {
  const handle = handlers[queue];
  const shape = JOB_SHAPES[queue];
  return (data: unknown, job: { readonly id: string }) => handle(shape.parse(data), job);
}

/** Fetches and does jobs until stopped; any number of processes may. Jobs under way are finished first. */
export async function workQueues(handlers: Handlers): Promise<{ stop(): Promise<void> }> {
  const boss = new PgBoss({
    connectionString: environment().DATABASE_URL,
    application_name: 'stilewright worker',
    max: 4,
    migrate: false,
    schedule: false,
    // Payloads of mails may carry a link that lets somebody in, so they are not kept long.
    archiveCompletedAfterSeconds: 600,
    deleteAfterMinutes: 60,
  });
  boss.on('error', (error) => console.error('queue:', error));
  await boss.start();
  for (const queue of QUEUES) {
    const handle = parsing(queue, handlers);
    await boss.work(queue, { batchSize: 1, pollingIntervalSeconds: 1 }, async ([job]) => {
      if (!job) return;
      try {
        await handle(job.data, { id: job.id });
      } catch (error) {
        console.error(`job ${job.id} of ${queue} failed:`, error);
        throw error;
      }
    });
  }
  return { stop: () => boss.stop({ graceful: true, wait: true, timeout: 20_000 }) };
}
