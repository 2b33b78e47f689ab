import { sql } from 'drizzle-orm';
import {
  boolean,
  foreignKey,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import type { ChoiceChange, Choices } from '@/lib/engine/types';
import { companyId, createdAt, instant, policies, rowId } from './columns';
import { jobs } from './job';
import { people } from './person';

/** One named set of choices for a job, A to F. */
export const schemes = pgTable(
  'schemes',
  {
    companyId: companyId(),
    id: rowId(),
    jobId: uuid('job_id').notNull(),
    letter: text('letter').notNull(),
    name: text('name').notNull(),
    choices: jsonb('choices').$type<Choices>().notNull(),
    /** Keys somebody has decided, and keys left to the salesperson. */
    decided: jsonb('decided').$type<string[]>().notNull(),
    unsure: jsonb('unsure').$type<string[]>().notNull(),
    /** Counts changes; an edit names the version it was made on. */
    version: integer('version').notNull().default(1),
    totalCents: integer('total_cents').notNull(),
    /** The contractor's own proposal, from which the homeowner starts. */
    proposed: boolean('proposed').notNull().default(false),
    archivedAt: instant('archived_at'),
    updatedAt: instant('updated_at').notNull().defaultNow(),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.companyId, t.id] }),
    foreignKey({ columns: [t.companyId, t.jobId], foreignColumns: [jobs.companyId, jobs.id] }),
    // A letter is free again once its scheme is thrown away.
    uniqueIndex('schemes_letter')
      .on(t.companyId, t.jobId, t.letter)
      .where(sql`archived_at is null`),
    ...policies('schemes', { guest: 'write' }),
  ],
);

/** Every version a scheme has had. */
export const schemeHistory = pgTable(
  'scheme_history',
  {
    companyId: companyId(),
    jobId: uuid('job_id').notNull(),
    schemeId: uuid('scheme_id').notNull(),
    version: integer('version').notNull(),
    change: jsonb('change').$type<ChoiceChange[]>().notNull(),
    choices: jsonb('choices').$type<Choices>().notNull(),
    totalCents: integer('total_cents').notNull(),
    personId: uuid('person_id').notNull(),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.companyId, t.schemeId, t.version] }),
    foreignKey({ columns: [t.companyId, t.schemeId], foreignColumns: [schemes.companyId, schemes.id] }),
    foreignKey({ columns: [t.companyId, t.jobId], foreignColumns: [jobs.companyId, jobs.id] }),
    foreignKey({ columns: [t.companyId, t.personId], foreignColumns: [people.companyId, people.id] }),
    ...policies('scheme_history', { guest: 'write', appendOnly: true }),
  ],
);
