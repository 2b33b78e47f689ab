import { sql } from 'drizzle-orm';
import { index, jsonb, pgPolicy, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core';
import { appUser, companyId, createdAt, policies, rowId, scopeCompany, scopeKind } from './columns';

/** Who did what; one row per verb that changed something. */
export const audit = pgTable(
  'audit',
  {
    companyId: companyId(),
    id: rowId(),
    jobId: uuid('job_id'),
    personId: uuid('person_id'),
    /** `member`, `guest` or `worker`. */
    actor: text('actor').notNull(),
    verb: text('verb').notNull(),
    subject: text('subject').notNull(),
    detail: jsonb('detail').notNull(),
    at: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.companyId, t.id] }),
    index('audit_job').on(t.companyId, t.jobId, t.at),
    ...policies('audit', { guest: 'write', appendOnly: true }),
  ],
);

const ownWorker = sql`company_id = ${scopeCompany} and ${scopeKind} = 'worker'`;

/** Webhook events already taken by a company, so that a second delivery changes nothing. */
export const webhookEvents = pgTable(
  'webhook_events',
  {
    companyId: companyId(),
    source: text('source', { enum: ['clerk', 'stripe'] }).notNull(),
    eventId: text('event_id').notNull(),
    type: text('type').notNull(),
    receivedAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.companyId, t.source, t.eventId] }),
    pgPolicy('webhook_events_select', { for: 'select', to: appUser, using: ownWorker }),
    pgPolicy('webhook_events_insert', { for: 'insert', to: appUser, withCheck: ownWorker }),
  ],
);
