import { sql } from 'drizzle-orm';
import {
  boolean,
  foreignKey,
  index,
  pgPolicy,
  pgTable,
  primaryKey,
  text,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import {
  appUser,
  companyId,
  createdAt,
  instant,
  policies,
  rowId,
  scopeCompany,
  scopeJob,
  scopeKey,
  scopeKind,
} from './columns';
import { companies } from './company';
import { jobs } from './job';

/** Someone known to one company; the same sign-in may have a row in several. */
export const people = pgTable(
  'people',
  {
    companyId: companyId().references(() => companies.id),
    id: rowId(),
    clerkUserId: text('clerk_user_id'),
    email: text('email').notNull(),
    name: text('name').notNull(),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.companyId, t.id] }),
    uniqueIndex('people_email').on(t.companyId, t.email),
    uniqueIndex('people_user').on(t.companyId, t.clerkUserId),
    index('people_clerk_user').on(t.clerkUserId),
    ...policies('people', {
      guest: 'read',
      // A guest reads the names of the household and of the staff, nobody else's.
      guestRows: sql`(
        exists (select 1 from guests g where g.company_id = people.company_id and g.person_id = people.id and g.job_id = ${scopeJob})
        or exists (select 1 from members m where m.company_id = people.company_id and m.person_id = people.id))`,
    }),
    pgPolicy('people_self', {
      for: 'select',
      to: appUser,
      using: sql`${scopeKind} = 'user' and clerk_user_id = ${scopeKey} and (${scopeCompany} is null or company_id = ${scopeCompany})`,
    }),
  ],
);

/** Staff, kept in step with the organisation's memberships. */
export const members = pgTable(
  'members',
  {
    companyId: companyId(),
    personId: uuid('person_id').notNull(),
    role: text('role', { enum: ['owner', 'salesperson'] }).notNull(),
    clerkMembershipId: text('clerk_membership_id').notNull(),
    active: boolean('active').notNull().default(true),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.companyId, t.personId] }),
    foreignKey({ columns: [t.companyId, t.personId], foreignColumns: [people.companyId, people.id] }),
    ...policies('members', { guest: 'read', guestRows: sql`true` }),
    pgPolicy('members_self', {
      for: 'select',
      to: appUser,
      using: sql`${scopeKind} = 'person' and company_id = ${scopeCompany} and person_id::text = ${scopeKey}`,
    }),
  ],
);

/** A homeowner's access to one job. */
export const guests = pgTable(
  'guests',
  {
    companyId: companyId(),
    jobId: uuid('job_id').notNull(),
    personId: uuid('person_id').notNull(),
    /** Whether their signature is required on every page of the book. */
    signer: boolean('signer').notNull(),
    revokedAt: instant('revoked_at'),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.companyId, t.jobId, t.personId] }),
    foreignKey({ columns: [t.companyId, t.personId], foreignColumns: [people.companyId, people.id] }),
    foreignKey({ columns: [t.companyId, t.jobId], foreignColumns: [jobs.companyId, jobs.id] }),
    index('guests_person').on(t.companyId, t.personId),
    ...policies('guests', { guest: 'read' }),
    pgPolicy('guests_self', {
      for: 'select',
      to: appUser,
      using: sql`${scopeKind} = 'person' and company_id = ${scopeCompany} and person_id::text = ${scopeKey}`,
    }),
  ],
);

/** An invitation to a job by mail; only the token's hash is kept. */
export const invitations = pgTable(
  'invitations',
  {
    companyId: companyId(),
    id: rowId(),
    jobId: uuid('job_id').notNull(),
    email: text('email').notNull(),
    name: text('name').notNull(),
    signer: boolean('signer').notNull(),
    invitedBy: uuid('invited_by').notNull(),
    tokenHash: text('token_hash').notNull(),
    expiresAt: instant('expires_at').notNull(),
    acceptedAt: instant('accepted_at'),
    revokedAt: instant('revoked_at'),
    createdAt: createdAt(),
  },
  (t) => [
    primaryKey({ columns: [t.companyId, t.id] }),
    foreignKey({ columns: [t.companyId, t.jobId], foreignColumns: [jobs.companyId, jobs.id] }),
    foreignKey({ columns: [t.companyId, t.invitedBy], foreignColumns: [people.companyId, people.id] }),
    uniqueIndex('invitations_token').on(t.tokenHash),
    index('invitations_job').on(t.companyId, t.jobId),
    ...policies('invitations', { guest: 'none' }),
    pgPolicy('invitations_by_token', {
      for: 'select',
      to: appUser,
      using: sql`${scopeKind} = 'invitation' and company_id = ${scopeCompany} and token_hash = ${scopeKey}`,
    }),
  ],
);
