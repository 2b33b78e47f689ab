import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { closePool } from '@/db/client';
import { ROLES, type Actor, type Role } from '@/lib/contracts/actor';
import type { Result } from '@/lib/contracts/result';
import { RIGHTS, reasonNot, type Verb } from '@/lib/contracts/rights';
import { cloneTestDatabase, type TestDatabase } from '@/lib/local/test-database';
import { publishEdition } from '@/lib/services/edition/publish';
import { listInvitations } from '@/lib/services/invitation/list';
import { revokeInvitation } from '@/lib/services/invitation/revoke';
import { sendInvitation } from '@/lib/services/invitation/send';
import { createJob } from '@/lib/services/job/create';
import { findJobByNumber } from '@/lib/services/job/find-by-number';
import { listJobs } from '@/lib/services/job/list';
import { moveJobStage } from '@/lib/services/job/move-stage';
import { readJob } from '@/lib/services/job/read';
import { changeScheme } from '@/lib/services/scheme/change';
import { createScheme } from '@/lib/services/scheme/create';
import { discardScheme } from '@/lib/services/scheme/discard';
import { duplicateScheme } from '@/lib/services/scheme/duplicate';
import { listSchemes } from '@/lib/services/scheme/list';
import { readKitchen } from '@/lib/services/scheme/read-kitchen';
import { readScheme } from '@/lib/services/scheme/read';
import { importSurvey } from '@/lib/services/survey/import';
import { CHOICES, SURVEY } from './kitchen-scene';
import { addContractor, addHousehold, codeOf, type Contractor, type Household } from './scene';

let database: TestDatabase;
let tern: Contractor;
let lane: Household;

beforeAll(async () => {
  database = await cloneTestDatabase();
  tern = await addContractor('tern-hollow');
  lane = await addHousehold(tern);
});

afterAll(async () => {
  await closePool();
  await database.drop();
});

const actorOf = (role: Role): Actor =>
  ({ owner: tern.owner, salesperson: tern.seller, homeowner: lane.guest })[role];

// A job that is not there: who may ask learns that, who may not learns nothing of it.
const jobId = randomUUID();
const schemeId = randomUUID();
const change = { jobId, schemeId, version: 1, changes: [], totalCents: 0 };

const SERVICES: readonly (readonly [string, Verb, (actor: Actor) => Promise<Result<unknown>>])[] = [
  ['listJobs', 'job.list', (actor) => listJobs(actor)],
  ['readJob', 'job.read', (actor) => readJob(actor, { jobId })],
  ['findJobByNumber', 'job.read', (actor) => findJobByNumber(actor, 9999)],
  ['createJob', 'job.create', (actor) => createJob(actor, { name: 'x', address: 'y' })],
  ['moveJobStage', 'job.moveStage', (actor) => moveJobStage(actor, { jobId, to: 'choosing' })],
  ['importSurvey', 'survey.import', (actor) => importSurvey(actor, { jobId, survey: SURVEY })],
  ['publishEdition', 'edition.publish', (actor) => publishEdition(actor, {})],
  [
    'sendInvitation',
    'invitation.send',
    (actor) => sendInvitation(actor, { jobId, email: 'a@b.example', name: 'a' }),
  ],
  ['listInvitations', 'invitation.send', (actor) => listInvitations(actor, { jobId })],
  ['revokeInvitation', 'invitation.revoke', (actor) => revokeInvitation(actor, { invitationId: jobId })],
  ['listSchemes', 'scheme.read', (actor) => listSchemes(actor, { jobId })],
  ['readScheme', 'scheme.read', (actor) => readScheme(actor, { jobId, schemeId })],
  ['readKitchen', 'scheme.read', (actor) => readKitchen(actor, { jobId })],
  ['createScheme', 'scheme.write', (actor) => createScheme(actor, { jobId, name: 'x', choices: CHOICES })],
  ['duplicateScheme', 'scheme.write', (actor) => duplicateScheme(actor, { jobId, schemeId })],
  ['changeScheme', 'scheme.write', (actor) => changeScheme(actor, change)],
  ['discardScheme', 'scheme.write', (actor) => discardScheme(actor, { jobId, schemeId })],
];

describe.each(SERVICES)('%s', (_, verb, ask) => {
  const allowed: readonly Role[] = RIGHTS[verb];

  it.each(ROLES)(`asks the table about ${verb} for the %s`, async (role) => {
    const result = await ask(actorOf(role));
    if (allowed.includes(role)) expect(codeOf(result)).not.toBe('notAllowed');
    else {
      expect(codeOf(result)).toBe('notAllowed');
      expect(result.ok ? '' : result.fault.sentence).toBe(reasonNot(role, verb));
    }
  });
});
