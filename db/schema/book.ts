import {
  foreignKey,
  index,
  integer,
  jsonb,
  pgTable,
  primaryKey,
  type PgTableExtraConfigValue,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import type { Choices } from '@/lib/engine/types';
import { PAGE_KINDS } from '@/lib/contracts/page';
import { CHANGE_ORDER_STATES } from '@/lib/contracts/states';
import { companyId, createdAt, instant, policies, rowId } from './columns';
import { editions, jobs, surveys } from './job';
import { people } from './person';
import { schemes } from './scheme';

/** A difference asked for after signing. */
export const changeOrders = pgTable(
  'change_orders',
  {
    companyId: companyId(),
    id: rowId(),
    jobId: uuid('job_id').notNull(),
    number: integer('number').notNull(),
    state: text('state', { enum: CHANGE_ORDER_STATES }).notNull().default('draft'),
    startedBy: text('started_by', { enum: ['homeowner', 'contractor'] }).notNull(),
    personId: uuid('person_id').notNull(),
    reason: text('reason').notNull(),
    choices: jsonb('choices').$type<Choices>().notNull(),
    editionId: uuid('edition_id').notNull(),
    surveyId: uuid('survey_id').notNull(),
    /** Sequence of the sealed page it is a difference to. */
    baseSequence: integer('base_sequence').notNull(),
    /** The offer its signers see now. */
    offerId: uuid('offer_id'),
    amountCents: integer('amount_cents').notNull().default(0),
    decidedBy: uuid('decided_by'),
    decisionReason: text('decision_reason'),
    decidedAt: instant('decided_at'),
    createdAt: createdAt(),
    updatedAt: instant('updated_at').notNull().defaultNow(),
  },
  // Typed, because the two tables refer to each other.
  (t): PgTableExtraConfigValue[] => [
    primaryKey({ columns: [t.companyId, t.id] }),
    foreignKey({ columns: [t.companyId, t.jobId], foreignColumns: [jobs.companyId, jobs.id] }),
    foreignKey({ columns: [t.companyId, t.personId], foreignColumns: [people.companyId, people.id] }),
    foreignKey({ columns: [t.companyId, t.editionId], foreignColumns: [editions.companyId, editions.id] }),
    foreignKey({ columns: [t.companyId, t.surveyId], foreignColumns: [surveys.companyId, surveys.id] }),
    foreignKey({ columns: [t.companyId, t.offerId], foreignColumns: [offers.companyId, offers.id] }),
    uniqueIndex('change_orders_number').on(t.companyId, t.jobId, t.number),
    index('change_orders_state').on(t.companyId, t.state),
    ...policies('change_orders', { guest: 'write' }),
  ],
);

/** What a signer is shown: the canonical bytes themselves, never rebuilt (R1). */
export const offers = pgTable(
  'offers',
  {
    companyId: companyId(),
    id: rowId(),
    jobId: uuid('job_id').notNull(),
    kind: text('kind', { enum: PAGE_KINDS }).notNull(),
    schemeId: uuid('scheme_id'),
    changeOrderId: uuid('change_order_id'),
    /** The offer that this one takes the place of because something moved. */
    replaces: uuid('replaces'),
    /** Canonical JSON (RFC 8785) as UTF-8 text. */
    body: text('body').notNull(),
    sha256: text('sha256').notNull(),
    totalCents: integer('total_cents').notNull(),
    createdBy: uuid('created_by').notNull(),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.companyId, t.id] }),
    foreignKey({ columns: [t.companyId, t.jobId], foreignColumns: [jobs.companyId, jobs.id] }),
    foreignKey({ columns: [t.companyId, t.schemeId], foreignColumns: [schemes.companyId, schemes.id] }),
    foreignKey({
      columns: [t.companyId, t.changeOrderId],
      foreignColumns: [changeOrders.companyId, changeOrders.id],
    }),
    foreignKey({ columns: [t.companyId, t.createdBy], foreignColumns: [people.companyId, people.id] }),
    index('offers_job').on(t.companyId, t.jobId, t.createdAt),
    ...policies('offers', { guest: 'write', appendOnly: true }),
  ],
);

/** One signer's signature under one offer (R4). */
export const signatures = pgTable(
  'signatures',
  {
    companyId: companyId(),
    id: rowId(),
    jobId: uuid('job_id').notNull(),
    offerId: uuid('offer_id').notNull(),
    personId: uuid('person_id').notNull(),
    role: text('role', { enum: ['homeowner', 'contractor'] }).notNull(),
    name: text('name').notNull(),
    offerSha256: text('offer_sha256').notNull(),
    /** Hash of the consent text that was agreed to. */
    consentSha256: text('consent_sha256').notNull(),
    /** `typed` or `drawn`, with what was typed or the strokes. */
    means: jsonb('means')
      .$type<{ kind: 'typed'; text: string } | { kind: 'drawn'; svgPath: string }>()
      .notNull(),
    signedAt: instant('signed_at').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.companyId, t.id] }),
    foreignKey({ columns: [t.companyId, t.offerId], foreignColumns: [offers.companyId, offers.id] }),
    foreignKey({ columns: [t.companyId, t.jobId], foreignColumns: [jobs.companyId, jobs.id] }),
    foreignKey({ columns: [t.companyId, t.personId], foreignColumns: [people.companyId, people.id] }),
    uniqueIndex('signatures_once').on(t.companyId, t.offerId, t.personId),
    ...policies('signatures', { guest: 'write', appendOnly: true }),
  ],
);

/** A sealed page of a job book (R2). */
export const pages = pgTable(
  'pages',
  {
    companyId: companyId(),
    jobId: uuid('job_id').notNull(),
    sequence: integer('sequence').notNull(),
    kind: text('kind', { enum: PAGE_KINDS }).notNull(),
    offerId: uuid('offer_id').notNull(),
    previousSha256: text('previous_sha256'),
    /** Canonical JSON of the envelope. */
    envelope: text('envelope').notNull(),
    sha256: text('sha256').notNull(),
    sealedAt: instant('sealed_at').notNull(),
  },
  (t) => [
    primaryKey({ columns: [t.companyId, t.jobId, t.sequence] }),
    foreignKey({ columns: [t.companyId, t.jobId], foreignColumns: [jobs.companyId, jobs.id] }),
    foreignKey({ columns: [t.companyId, t.offerId], foreignColumns: [offers.companyId, offers.id] }),
    uniqueIndex('pages_offer').on(t.companyId, t.offerId),
    ...policies('pages', { guest: 'write', appendOnly: true }),
  ],
);
