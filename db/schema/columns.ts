import { sql, type SQL } from 'drizzle-orm';
import { pgPolicy, pgRole, timestamp, uuid } from 'drizzle-orm/pg-core';

/** The role the program connects as. It owns nothing; set-up creates it. */
export const appUser = pgRole('app_user').existing();

export const companyId = () => uuid('company_id').notNull();
export const rowId = () => uuid('id').notNull().defaultRandom();
export const createdAt = () => timestamp('created_at', { withTimezone: true }).notNull().defaultNow();
export const instant = (name: string) => timestamp(name, { withTimezone: true });

// Wrapped in a select so that each is evaluated once per query, and nullif because a setting that was local
// to an earlier transaction reads as ''.
export const scopeKind = sql`(select nullif(current_setting('app.kind', true), ''))`;
export const scopeCompany = sql`(select nullif(current_setting('app.company', true), '')::uuid)`;
export const scopeJob = sql`(select nullif(current_setting('app.job', true), '')::uuid)`;
export const scopePerson = sql`(select nullif(current_setting('app.person', true), '')::uuid)`;
/** A key by which one row may be looked up before a scope is known: a slug, an account, a user id... */
export const scopeKey = sql`(select nullif(current_setting('app.key', true), ''))`;

type Access = 'none' | 'read' | 'write';

/**
 * Row-level policies of a table that has `company_id` and, when guests may see it, `job_id`.
 * Members and workers see their company; a guest sees one job of it. Append-only tables get no update or delete.
 */
export function policies(
  table: string,
  { guest, appendOnly = false, guestRows }: { guest: Access; appendOnly?: boolean; guestRows?: SQL },
) {
  const staff = sql`company_id = ${scopeCompany} and ${scopeKind} in ('member', 'worker')`;
  const ownJob = guestRows ?? sql`job_id = ${scopeJob}`;
  const guestSees = sql`company_id = ${scopeCompany} and ${scopeKind} = 'guest' and ${ownJob}`;
  const reads = guest === 'none' ? staff : sql`(${staff}) or (${guestSees})`;
  const writes = guest === 'write' ? sql`(${staff}) or (${guestSees})` : staff;
  const base = [
    pgPolicy(`${table}_select`, { for: 'select', to: appUser, using: reads }),
    pgPolicy(`${table}_insert`, { for: 'insert', to: appUser, withCheck: writes }),
  ];
  if (appendOnly) return base;
  return [
    ...base,
    pgPolicy(`${table}_update`, { for: 'update', to: appUser, using: writes, withCheck: writes }),
    pgPolicy(`${table}_delete`, { for: 'delete', to: appUser, using: writes }),
  ];
}
