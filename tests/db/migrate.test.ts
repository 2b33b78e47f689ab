import { randomBytes } from 'node:crypto';
import { readFileSync } from 'node:fs';
import path from 'node:path';
import postgres from 'postgres';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { migrate } from '@/db/migrate';
import { FAILED_QUEUE, QUEUES } from '@/lib/contracts/jobs';

const template = new URL(process.env.TEST_DATABASE_OWNER_URL ?? '');
const name = `test_${process.pid}_${randomBytes(4).toString('hex')}`;
const at = (database: string) => Object.assign(new URL(template), { pathname: `/${database}` }).toString();
let maintenance: postgres.Sql;

beforeAll(async () => {
  maintenance = postgres(at('postgres'), { max: 1, onnotice: () => undefined });
  await maintenance`create database ${maintenance(name)}`;
});

afterAll(async () => {
  await maintenance`drop database if exists ${maintenance(name)} with (force)`;
  await maintenance.end();
});

describe('migrate', () => {
  const journal = JSON.parse(
    readFileSync(path.join(__dirname, '../../db/migrations/meta/_journal.json'), 'utf8'),
  );
  const known: number = journal.entries.length;

  it('twenty migrators of one empty database at once: each answers the same, every migration is applied once', async () => {
    const answers = await Promise.all(Array.from({ length: 20 }, () => migrate(at(name))));
    expect(answers).toEqual(Array(20).fill(known));
    const sql = postgres(at(name), { max: 1 });
    try {
      const applied = await sql`select hash from drizzle.__drizzle_migrations`;
      expect(new Set(applied.map((row) => String(row.hash))).size).toBe(known);
      expect(applied).toHaveLength(known);
      const queues = await sql`select name, dead_letter from pgboss.queue order by name`;
      expect(queues.map((row) => [row.name, row.dead_letter])).toEqual(
        [[FAILED_QUEUE, null], ...QUEUES.map((queue) => [queue, FAILED_QUEUE])].sort(),
      );
    } finally {
      await sql.end();
    }
  });

  it('a database that holds more migrations than the program knows is refused', async () => {
    const sql = postgres(at(name), { max: 1 });
    try {
      await sql`insert into drizzle.__drizzle_migrations (hash, created_at) values ('another version', 9999999999999)`;
      await expect(migrate(at(name))).rejects.toThrow('another version');
    } finally {
      await sql.end();
    }
  });
});
