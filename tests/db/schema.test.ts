import { getTableColumns, is } from 'drizzle-orm';
import { getTableConfig, PgTable } from 'drizzle-orm/pg-core';
import postgres from 'postgres';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import * as schema from '@/db/schema';
import { cloneTestDatabase, type TestDatabase } from '@/lib/local/test-database';

const tables = Object.values(schema)
  .filter((value) => is(value, PgTable))
  .map((table) => ({ table, config: getTableConfig(table) }));

let database: TestDatabase;
let sql: postgres.Sql;

beforeAll(async () => {
  database = await cloneTestDatabase();
  sql = postgres(database.ownerUrl, { max: 1 });
});

afterAll(async () => {
  await sql.end();
  await database.drop();
});

describe('the migrated database and the schema agree', () => {
  it('on the tables', async () => {
    const rows = await sql`select tablename from pg_tables where schemaname = 'public' order by 1`;
    expect(rows.map((row) => row.tablename)).toEqual(tables.map(({ config }) => config.name).sort());
  });

  it.each(tables.map(({ table, config }) => [config.name, table] as const))(
    'on the columns of %s',
    async (name, table) => {
      const rows = await sql`
        select column_name as name, data_type as type, is_nullable = 'NO' as required, column_default is not null as filled
        from information_schema.columns where table_schema = 'public' and table_name = ${name} order by 1`;
      const said = Object.values(getTableColumns(table))
        .map((column) => ({
          name: column.name,
          type: column.getSQLType(),
          required: column.notNull,
          filled: column.hasDefault,
        }))
        .sort((a, b) => (a.name < b.name ? -1 : 1));
      expect(rows.map((row) => ({ ...row }))).toEqual(said);
    },
  );

  it('on keys: every row of a company is found by company first, and refers only within its company', async () => {
    const rows = await sql`
      select conrelid::regclass::text as table, contype::text as type,
        (select array_agg(attname::text order by n) from unnest(conkey) with ordinality k(num, n)
          join pg_attribute on attrelid = conrelid and attnum = num) as columns,
        confrelid::regclass::text as target
      from pg_constraint where connamespace = 'public'::regnamespace and contype in ('p', 'f')`;
    const spelled = (type: string, table: string, columns: readonly string[], target: string) =>
      `${table} ${type} ${columns.join(',')}${type === 'f' ? ` -> ${target}` : ''}`;
    const said = tables.flatMap(({ config }) => [
      ...config.foreignKeys.map((key) => {
        const { columns, foreignTable } = key.reference();
        const names = columns.map((column) => column.name);
        return spelled('f', config.name, names, getTableConfig(foreignTable).name);
      }),
      ...config.primaryKeys.map((key) =>
        spelled(
          'p',
          config.name,
          key.columns.map((column) => column.name),
          '',
        ),
      ),
      ...config.columns
        .filter((column) => column.primary)
        .map((column) => spelled('p', config.name, [column.name], '')),
    ]);
    const held = rows.map((row) => spelled(row.type, row.table, row.columns, row.target));
    expect(held.sort()).toEqual(said.sort());
    for (const row of rows) {
      if (row.table === 'companies' || row.table === 'webhook_events') continue;
      expect(row.columns[0], `${row.table} ${row.type}`).toBe('company_id');
    }
  });

  it('on indexes', async () => {
    const rows = await sql`
      select indexname from pg_indexes where schemaname = 'public'
      and indexname not in (select conname from pg_constraint where contype = 'p') order by 1`;
    const said = tables.flatMap(({ config }) => config.indexes.map((index) => index.config.name ?? ''));
    expect(rows.map((row) => String(row.indexname))).toEqual(said.sort());
  });

  it('on policies, which are for the application role alone', async () => {
    const rows = await sql`
      select tablename || ' ' || policyname || ' ' || lower(cmd) || ' ' || roles::text as line
      from pg_policies where schemaname = 'public'`;
    const said = tables.flatMap(({ config }) =>
      config.policies.map((policy) => `${config.name} ${policy.name} ${policy.for ?? 'all'} {app_user}`),
    );
    expect(rows.map((row) => String(row.line)).sort()).toEqual(said.sort());
  });

  it('on row-level security, which is on and forced everywhere, for an owner that may not pass it by', async () => {
    const rows = await sql`
      select relname, relrowsecurity, relforcerowsecurity, pg_get_userbyid(relowner) as owner
      from pg_class where relnamespace = 'public'::regnamespace and relkind = 'r'`;
    for (const row of rows) {
      expect({ ...row }).toEqual({
        relname: row.relname,
        relrowsecurity: true,
        relforcerowsecurity: true,
        owner: 'app_owner',
      });
    }
    const roles = await sql`
      select rolname from pg_roles where rolname in ('app_owner', 'app_user') and (rolsuper or rolbypassrls)`;
    expect([...roles]).toEqual([]);
  });
});
