import { and, eq } from 'drizzle-orm';
import postgres from 'postgres';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { closePool, withScope } from '@/db/client';
import { guests, invitations, people } from '@/db/schema';
import { sha256 } from '@/lib/adapters/ids';
import { mailJobShape, type MailJob } from '@/lib/contracts/jobs';
import type { SignedIn } from '@/lib/contracts/sign-in';
import { cloneTestDatabase, type TestDatabase } from '@/lib/local/test-database';
import { acceptInvitation } from '@/lib/services/invitation/accept';
import { listInvitations } from '@/lib/services/invitation/list';
import { readInvitation } from '@/lib/services/invitation/read';
import { revokeInvitation } from '@/lib/services/invitation/revoke';
import { sendInvitation } from '@/lib/services/invitation/send';
import { listOwnJobs } from '@/lib/services/session/list-own-jobs';
import { resolveActor } from '@/lib/services/session/resolve-actor';
import { addContractor, addHousehold, codeOf, valueOf, type Contractor, type Household } from './scene';

let database: TestDatabase;
let owner: postgres.Sql;
let tern: Contractor;
let quill: Contractor;
let lane: Household;
let race: Household;
let foreign: Household;

beforeAll(async () => {
  database = await cloneTestDatabase();
  owner = postgres(database.ownerUrl, { max: 1 });
  tern = await addContractor('tern-hollow');
  quill = await addContractor('quillback');
  lane = await addHousehold(tern);
  race = await addHousehold(tern);
  foreign = await addHousehold(quill);
});

afterEach(() => {
  delete process.env.STILEWRIGHT_CLOCK;
});

afterAll(async () => {
  await closePool();
  await owner.end();
  await database.drop();
});

let counted = 0;
const visitor = (email: string, userId = `user_${email}`): SignedIn => ({
  userId,
  name: '',
  verifiedEmails: [email],
});

/** The mails waiting for an address, oldest first. */
async function mailsTo(email: string): Promise<MailJob[]> {
  const rows = await owner`select data from pgboss.job where name = 'mail' order by created_on`;
  return rows.map((row) => mailJobShape.parse(row.data)).filter((mail) => mail.to.email === email);
}

/** Sends an invitation and takes the token out of the link in its mail, as its reader would. */
async function invite(household: Household = lane, contractor: Contractor = tern) {
  const email = `mara.${(counted += 1)}@winslade.example`;
  const asked = { jobId: household.jobId, email, name: 'Mara Winslade', signer: true };
  const invitation = valueOf(await sendInvitation(contractor.seller, asked));
  return { email, invitation, asked, link: await linkTo(email) };
}

async function linkTo(email: string) {
  const mail = (await mailsTo(email)).at(-1);
  const [, slug = '', token = ''] = /\/([^/]+)\/invitation\/([^/]+)$/.exec(mail?.action?.url ?? '') ?? [];
  return { slug, token };
}

describe('an invitation', () => {
  it('is a mail with a link of 32 random bytes, of which the database holds the hash alone', async () => {
    const { email, invitation, link } = await invite();
    expect(Buffer.from(link.token, 'base64url')).toHaveLength(32);
    const [row] = await withScope(tern.worker, (tx) =>
      tx.select().from(invitations).where(eq(invitations.id, invitation.id)),
    );
    expect(row?.tokenHash).toBe(sha256(link.token));
    expect(JSON.stringify(row)).not.toContain(link.token);
    expect(JSON.stringify(invitation)).not.toContain(link.token);
    const mails = await mailsTo(email);
    expect(mails).toHaveLength(1);
    expect(mails[0]?.action?.url.startsWith(process.env.APP_ORIGIN ?? 'none')).toBe(true);
  });

  it('that is not stored sends no mail', async () => {
    const email = 'nobody@winslade.example';
    const asked = { jobId: foreign.jobId, email, name: 'Nobody' };
    expect(codeOf(await sendInvitation(tern.owner, asked))).toBe('notFound');
    expect(await mailsTo(email)).toEqual([]);
  });

  it('tells the holder of the link what it is for before sign-in, and nobody else', async () => {
    const { email, link } = await invite();
    expect(valueOf(await readInvitation(link))).toMatchObject({
      state: 'open',
      email,
      jobName: 'Job 1',
      invitedBy: tern.seller.name,
      company: { slug: 'tern-hollow' },
    });
    for (const other of [
      { ...link, slug: 'quillback' },
      { ...link, slug: 'nobody' },
      { ...link, token: sha256(link.token).slice(0, 43) },
      { ...link, token: `${link.token}x` },
    ]) {
      expect(codeOf(await readInvitation(other))).toBe('notFound');
      expect(codeOf(await acceptInvitation(visitor(email), other))).toBe('notFound');
    }
  });

  it('lets in whoever has shown the invited address to be theirs, in any case of letters, and nobody else', async () => {
    const { email, link } = await invite();
    for (const stranger of [visitor('other@winslade.example'), { ...visitor(email), verifiedEmails: [] }]) {
      const refused = await acceptInvitation(stranger, link);
      expect(codeOf(refused)).toBe('notAllowed');
      expect(
        await resolveActor({ slug: 'tern-hollow', clerkUserId: stranger.userId, jobId: lane.jobId }),
      ).toBeNull();
    }
    const mara = visitor(email.toUpperCase(), `user_${email}`);
    expect(valueOf(await acceptInvitation(mara, link))).toEqual({
      jobId: lane.jobId,
      company: 'tern-hollow',
    });
    expect(
      await resolveActor({ slug: 'tern-hollow', clerkUserId: mara.userId, jobId: lane.jobId }),
    ).toMatchObject({ kind: 'guest', role: 'homeowner', signer: true, name: 'Mara Winslade', email });
    expect(valueOf(await readInvitation(link)).state).toBe('accepted');
  });

  it('accepted ten times at once and once more lets one person in once', async () => {
    const { email, link } = await invite();
    const mara = visitor(email);
    const answers = await Promise.all(Array.from({ length: 10 }, () => acceptInvitation(mara, link)));
    expect(answers.map(codeOf)).toEqual(Array(10).fill('ok'));
    expect(codeOf(await acceptInvitation(mara, link))).toBe('ok');
    const held = await withScope(tern.worker, async (tx) => ({
      people: await tx.select().from(people).where(eq(people.email, email)),
      guests: await tx
        .select()
        .from(guests)
        .innerJoin(people, and(eq(people.companyId, guests.companyId), eq(people.id, guests.personId)))
        .where(eq(people.email, email)),
    }));
    expect([held.people.length, held.guests.length]).toEqual([1, 1]);
  });

  it('used once does not let its reader in again after the contractor took the access away', async () => {
    const { email, link } = await invite();
    const mara = visitor(email);
    valueOf(await acceptInvitation(mara, link));
    const actor = await resolveActor({
      slug: 'tern-hollow',
      clerkUserId: mara.userId,
      jobId: lane.jobId,
    });
    await withScope(tern.worker, (tx) =>
      tx
        .update(guests)
        .set({ revokedAt: new Date() })
        .where(eq(guests.personId, actor?.personId ?? '')),
    );
    expect(codeOf(await acceptInvitation(mara, link))).toBe('conflict');
    expect(
      await resolveActor({ slug: 'tern-hollow', clerkUserId: mara.userId, jobId: lane.jobId }),
    ).toBeNull();
  });

  it('is good until the last moment of its fourteenth day and not a moment longer', async () => {
    process.env.STILEWRIGHT_CLOCK = '2026-12-01T12:00:00.000Z';
    const late = await invite();
    const inTime = await invite();
    expect(late.invitation.expiresAt).toBe('2026-12-15T12:00:00.000Z');
    process.env.STILEWRIGHT_CLOCK = '2026-12-15T11:59:59.999Z';
    expect(codeOf(await acceptInvitation(visitor(inTime.email), inTime.link))).toBe('ok');
    process.env.STILEWRIGHT_CLOCK = '2026-12-15T12:00:00.000Z';
    expect(valueOf(await readInvitation(late.link)).state).toBe('expired');
    expect(codeOf(await acceptInvitation(visitor(late.email), late.link))).toBe('conflict');
  });

  it('taken back lets nobody in; one that was accepted cannot be taken back', async () => {
    const { email, invitation, link } = await invite();
    const which = { invitationId: invitation.id };
    expect(valueOf(await revokeInvitation(tern.owner, which)).state).toBe('revoked');
    expect(valueOf(await revokeInvitation(tern.owner, which)).state).toBe('revoked');
    expect(codeOf(await acceptInvitation(visitor(email), link))).toBe('conflict');
    const other = await invite();
    valueOf(await acceptInvitation(visitor(other.email), other.link));
    expect(codeOf(await revokeInvitation(tern.owner, { invitationId: other.invitation.id }))).toBe(
      'conflict',
    );
  });

  it('sent again ends the earlier one, so that one link at a time is good', async () => {
    const { email, asked, link } = await invite();
    valueOf(await sendInvitation(tern.owner, asked));
    const second = await linkTo(email);
    expect(second.token).not.toBe(link.token);
    expect(codeOf(await acceptInvitation(visitor(email), link))).toBe('conflict');
    expect(codeOf(await acceptInvitation(visitor(email), second))).toBe('ok');
    expect(codeOf(await sendInvitation(tern.owner, asked))).toBe('conflict');
  });

  it('is sent, listed and taken back by the staff of its company alone', async () => {
    const { asked, invitation } = await invite();
    const which = { invitationId: invitation.id };
    expect(codeOf(await sendInvitation(lane.guest, asked))).toBe('notAllowed');
    expect(codeOf(await listInvitations(lane.guest, asked))).toBe('notAllowed');
    expect(codeOf(await revokeInvitation(lane.guest, which))).toBe('notAllowed');
    expect(codeOf(await sendInvitation(quill.owner, asked))).toBe('notFound');
    expect(codeOf(await listInvitations(quill.owner, asked))).toBe('notFound');
    expect(codeOf(await revokeInvitation(quill.owner, which))).toBe('notFound');
    const listed = valueOf(await listInvitations(tern.seller, asked));
    expect(listed.map((one) => one.id)).toContain(invitation.id);
    expect(new Set(listed.map((one) => one.jobId))).toEqual(new Set([lane.jobId]));
  });

  it('without a name or a mail address is refused by path', async () => {
    const refused = await sendInvitation(tern.owner, { jobId: lane.jobId, email: 'mara', name: ' ' });
    const shape = z.object({ fault: z.object({ faults: z.array(z.object({ path: z.string() })) }) });
    expect(shape.parse(refused).fault.faults.map((fault) => fault.path)).toEqual(['email', 'name']);
  });
});

describe('who a visitor is', () => {
  const at = (slug: string, clerkUserId: string, jobId?: string) =>
    resolveActor({ slug, clerkUserId, jobId });

  it('staff of their own company alone', async () => {
    expect(await at('tern-hollow', 'user_owner_tern-hollow')).toEqual(tern.owner);
    expect(await at('tern-hollow', 'user_salesperson_tern-hollow', lane.jobId)).toEqual(tern.seller);
    expect(await at('quillback', 'user_owner_tern-hollow')).toBeNull();
    expect(await at('quillback', 'user_owner_tern-hollow', foreign.jobId)).toBeNull();
    expect(await at('nowhere', 'user_owner_tern-hollow')).toBeNull();
  });

  it('a homeowner at their own job alone', async () => {
    expect(await at('tern-hollow', lane.clerkUserId, lane.jobId)).toEqual(lane.guest);
    expect(await at('tern-hollow', lane.clerkUserId, race.jobId)).toBeNull();
    expect(await at('tern-hollow', lane.clerkUserId, foreign.jobId)).toBeNull();
    expect(await at('quillback', lane.clerkUserId, lane.jobId)).toBeNull();
    expect(await at('tern-hollow', lane.clerkUserId)).toBeNull();
    expect(await at('tern-hollow', lane.clerkUserId, 'no job')).toBeNull();
    expect(await at('tern-hollow', 'user_nobody', lane.jobId)).toBeNull();
  });

  it('finds the jobs that are theirs, all of the company’s for staff', async () => {
    const own = async (slug: string, clerkUserId: string) =>
      (await listOwnJobs({ slug, clerkUserId }))?.jobs.map((job) => job.id);
    expect(await own('tern-hollow', lane.clerkUserId)).toEqual([lane.jobId]);
    expect(await own('tern-hollow', race.clerkUserId)).toEqual([race.jobId]);
    expect(await own('quillback', lane.clerkUserId)).toEqual([]);
    expect(await own('tern-hollow', 'user_owner_tern-hollow')).toEqual([race.jobId, lane.jobId]);
    expect(await own('nowhere', lane.clerkUserId)).toBeUndefined();
  });
});
