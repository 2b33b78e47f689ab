import { sql } from 'drizzle-orm';
import { jsonb, pgPolicy, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import type { CompanyBrand } from '@/lib/contracts/brand';
import type { CompanySettings } from '@/lib/contracts/company';
import { appUser, createdAt, scopeCompany, scopeKey, scopeKind } from './columns';

/** A contractor. Its id is the `company_id` of every other row. */
export const companies = pgTable(
  'companies',
  {
    id: uuid('id').primaryKey(),
    slug: text('slug').notNull(),
    name: text('name').notNull(),
    phone: text('phone').notNull(),
    licence: text('licence'),
    timeZone: text('time_zone').notNull(),
    state: text('state').notNull(),
    brand: jsonb('brand').$type<CompanyBrand['brand']>().notNull(),
    settings: jsonb('settings').$type<CompanySettings>().notNull(),
    clerkOrganizationId: text('clerk_organization_id').notNull(),
    stripeAccountId: text('stripe_account_id').notNull(),
    createdAt: createdAt(),
  },
  (t) => [
    uniqueIndex('companies_slug').on(t.slug),
    uniqueIndex('companies_organization').on(t.clerkOrganizationId),
    uniqueIndex('companies_account').on(t.stripeAccountId),
    pgPolicy('companies_select', {
      for: 'select',
      to: appUser,
      using: sql`id = ${scopeCompany}
        or (${scopeKind} = 'slug' and slug = ${scopeKey})
        or (${scopeKind} = 'organization' and clerk_organization_id = ${scopeKey})
        or (${scopeKind} = 'account' and stripe_account_id = ${scopeKey})`,
    }),
    pgPolicy('companies_insert', {
      for: 'insert',
      to: appUser,
      withCheck: sql`id = ${scopeCompany} and ${scopeKind} = 'worker'`,
    }),
    pgPolicy('companies_update', {
      for: 'update',
      to: appUser,
      using: sql`id = ${scopeCompany} and ${scopeKind} in ('member', 'worker')`,
      withCheck: sql`id = ${scopeCompany} and ${scopeKind} in ('member', 'worker')`,
    }),
  ],
);
