import {
  foreignKey,
  index,
  integer,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import { DRAW_STATES } from '@/lib/contracts/states';
import { companyId, createdAt, instant, policies, rowId } from './columns';
import { jobs } from './job';
import { people } from './person';

/** One payment of the schedule. */
export const draws = pgTable(
  'draws',
  {
    companyId: companyId(),
    id: rowId(),
    jobId: uuid('job_id').notNull(),
    number: integer('number').notNull(),
    label: text('label').notNull(),
    /** The stage at which it falls due. */
    due: text('due', { enum: ['signing', 'released', 'materialsIn', 'installing', 'walkThrough'] }).notNull(),
    amountCents: integer('amount_cents').notNull(),
    state: text('state', { enum: DRAW_STATES }).notNull().default('planned'),
    createdAt: createdAt(),
    updatedAt: instant('updated_at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ columns: [t.companyId, t.id] }),
    foreignKey({ columns: [t.companyId, t.jobId], foreignColumns: [jobs.companyId, jobs.id] }),
    uniqueIndex('draws_number').on(t.companyId, t.jobId, t.number),
    // Guests cause writes when they pay or sign; services decide which.
    ...policies('draws', { guest: 'write' }),
  ],
);

/** An attempt to pay a draw through the payment service. */
export const payments = pgTable(
  'payments',
  {
    companyId: companyId(),
    id: rowId(),
    jobId: uuid('job_id').notNull(),
    drawId: uuid('draw_id').notNull(),
    intentId: text('intent_id').notNull(),
    amountCents: integer('amount_cents').notNull(),
    status: text('status').notNull(),
    createdBy: uuid('created_by').notNull(),
    createdAt: createdAt(),
    updatedAt: instant('updated_at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ columns: [t.companyId, t.id] }),
    foreignKey({ columns: [t.companyId, t.drawId], foreignColumns: [draws.companyId, draws.id] }),
    foreignKey({ columns: [t.companyId, t.jobId], foreignColumns: [jobs.companyId, jobs.id] }),
    foreignKey({ columns: [t.companyId, t.createdBy], foreignColumns: [people.companyId, people.id] }),
    uniqueIndex('payments_intent').on(t.companyId, t.intentId),
    index('payments_draw').on(t.companyId, t.drawId),
    ...policies('payments', { guest: 'write' }),
  ],
);

/** What the homeowner owes (positive) and has paid (negative); the sum is the balance. */
export const ledger = pgTable(
  'ledger',
  {
    companyId: companyId(),
    id: rowId(),
    jobId: uuid('job_id').notNull(),
    kind: text('kind', { enum: ['agreement', 'changeOrder', 'payment', 'refund', 'reversal'] }).notNull(),
    amountCents: integer('amount_cents').notNull(),
    drawId: uuid('draw_id'),
    pageSequence: integer('page_sequence'),
    /** The payment service's object that this entry stands for; one entry for each. */
    externalId: text('external_id'),
    memo: text('memo').notNull(),
    at: instant('at').notNull(),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.companyId, t.id] }),
    foreignKey({ columns: [t.companyId, t.jobId], foreignColumns: [jobs.companyId, jobs.id] }),
    foreignKey({ columns: [t.companyId, t.drawId], foreignColumns: [draws.companyId, draws.id] }),
    uniqueIndex('ledger_external').on(t.companyId, t.kind, t.externalId),
    uniqueIndex('ledger_page').on(t.companyId, t.jobId, t.pageSequence),
    index('ledger_job').on(t.companyId, t.jobId),
    ...policies('ledger', { guest: 'write', appendOnly: true }),
  ],
);
