import { sql } from 'drizzle-orm';
import {
  foreignKey,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  type PgTableExtraConfigValue,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import type { Edition, EditionCosts } from '@/lib/engine/edition-types';
import type { Survey } from '@/lib/engine/types';
import { JOB_STAGES } from '@/lib/contracts/states';
import { companyId, createdAt, policies, rowId, scopeJob } from './columns';
import { companies } from './company';
import { people } from './person';

/** One kitchen of one household. */
export const jobs = pgTable(
  'jobs',
  {
    companyId: companyId().references(() => companies.id),
    id: rowId(),
    /** Counts within the company; what people say on the telephone. */
    number: integer('number').notNull(),
    name: text('name').notNull(),
    address: text('address').notNull(),
    stage: text('stage', { enum: JOB_STAGES }).notNull().default('measured'),
    salespersonId: uuid('salesperson_id').notNull(),
    surveyId: uuid('survey_id'),
    editionId: uuid('edition_id'),
    /** The first estimate, from which the price tape hangs until something is signed. */
    firstEstimateCents: integer('first_estimate_cents'),
    createdAt: createdAt(),
  },
  // Typed, because the tables refer to each other.
  (t): PgTableExtraConfigValue[] => [
    primaryKey({ columns: [t.companyId, t.id] }),
    foreignKey({ columns: [t.companyId, t.salespersonId], foreignColumns: [people.companyId, people.id] }),
    foreignKey({ columns: [t.companyId, t.surveyId], foreignColumns: [surveys.companyId, surveys.id] }),
    foreignKey({ columns: [t.companyId, t.editionId], foreignColumns: [editions.companyId, editions.id] }),
    uniqueIndex('jobs_number').on(t.companyId, t.number),
    ...policies('jobs', { guest: 'read', guestRows: sql`id = ${scopeJob}` }),
  ],
);

/** A surveyed kitchen; versions are added, never altered. */
export const surveys = pgTable(
  'surveys',
  {
    companyId: companyId(),
    id: rowId(),
    jobId: uuid('job_id').notNull(),
    number: integer('number').notNull(),
    body: jsonb('body').$type<Survey>().notNull(),
    sha256: text('sha256').notNull(),
    createdBy: uuid('created_by').notNull(),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.companyId, t.id] }),
    foreignKey({ columns: [t.companyId, t.jobId], foreignColumns: [jobs.companyId, jobs.id] }),
    foreignKey({ columns: [t.companyId, t.createdBy], foreignColumns: [people.companyId, people.id] }),
    uniqueIndex('surveys_number').on(t.companyId, t.jobId, t.number),
    ...policies('surveys', { guest: 'read', appendOnly: true }),
  ],
);

/** A published price book, without costs. */
export const editions = pgTable(
  'editions',
  {
    companyId: companyId().references(() => companies.id),
    id: rowId(),
    number: integer('number').notNull(),
    body: jsonb('body').$type<Edition>().notNull(),
    sha256: text('sha256').notNull(),
    publishedBy: uuid('published_by').notNull(),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.companyId, t.id] }),
    foreignKey({ columns: [t.companyId, t.publishedBy], foreignColumns: [people.companyId, people.id] }),
    uniqueIndex('editions_number').on(t.companyId, t.number),
    ...policies('editions', { guest: 'read', guestRows: sql`true`, appendOnly: true }),
  ],
);

/** What an edition costs the contractor; in its own table so that no guest's query can reach it. */
export const editionCosts = pgTable(
  'edition_costs',
  {
    companyId: companyId(),
    editionId: uuid('edition_id').notNull(),
    body: jsonb('body').$type<EditionCosts>().notNull(),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.companyId, t.editionId] }),
    foreignKey({ columns: [t.companyId, t.editionId], foreignColumns: [editions.companyId, editions.id] }),
    ...policies('edition_costs', { guest: 'none', appendOnly: true }),
  ],
);
