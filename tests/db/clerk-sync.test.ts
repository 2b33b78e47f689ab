import { and, eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { closePool, withScope } from '@/db/client';
import { audit, members, people } from '@/db/schema';
import type { ClerkEvent } from '@/lib/contracts/clerk-event';
import { cloneTestDatabase, type TestDatabase } from '@/lib/local/test-database';
import { syncClerkEvent } from '@/lib/services/person/sync-clerk-event';
import { resolveActor } from '@/lib/services/session/resolve-actor';
import { addContractor, addHousehold, type Contractor, type Household } from './scene';

let database: TestDatabase;
let tern: Contractor;
let quill: Contractor;
let lane: Household;

beforeAll(async () => {
  database = await cloneTestDatabase();
  tern = await addContractor('tern-hollow');
  quill = await addContractor('quillback');
  lane = await addHousehold(tern);
});

afterAll(async () => {
  await closePool();
  await database.drop();
});

let counted = 0;
const eventId = () => `evt_${(counted += 1)}`;

type Saved = Extract<ClerkEvent, { type: 'membershipSaved' }>;
type Ended = Extract<ClerkEvent, { type: 'membershipDeleted' }>;

function joining(name: string, more: Partial<Saved> = {}): Saved {
  return {
    id: eventId(),
    type: 'membershipSaved',
    membershipId: `orgmem_${name}`,
    organizationId: 'org_tern-hollow',
    userId: `user_${name}`,
    role: 'salesperson',
    email: `${name}@ternhollow.example`,
    name,
    ...more,
  };
}

const leaving = ({ membershipId, organizationId, userId }: Saved): Ended => ({
  id: eventId(),
  type: 'membershipDeleted',
  membershipId,
  organizationId,
  userId,
});

const whoIs = (clerkUserId: string, slug = 'tern-hollow') => resolveActor({ slug, clerkUserId });

const staff = (companyId: string, name: string) =>
  withScope({ kind: 'worker', companyId }, (tx) =>
    tx
      .select({ role: members.role, active: members.active })
      .from(members)
      .innerJoin(people, and(eq(people.companyId, members.companyId), eq(people.id, members.personId)))
      .where(eq(people.clerkUserId, `user_${name}`)),
  );

describe('memberships', () => {
  it('delivered again and again, also at once, make one member and one audit row', async () => {
    const event = joining('rowan');
    const answers = await Promise.all(Array.from({ length: 5 }, () => syncClerkEvent(event)));
    expect(answers.filter((answer) => answer === 'synced')).toHaveLength(1);
    expect(await syncClerkEvent(event)).toBe('duplicate');
    expect(await staff(tern.companyId, 'rowan')).toEqual([{ role: 'salesperson', active: true }]);
    const rows = await withScope(tern.worker, (tx) =>
      tx.select().from(audit).where(eq(audit.verb, 'member.save')),
    );
    expect(rows).toHaveLength(1);
  });

  it('belong to the company of the organisation and give nothing in another', async () => {
    await syncClerkEvent(joining('una'));
    expect(await whoIs('user_una')).toMatchObject({ kind: 'member', role: 'salesperson' });
    expect(await whoIs('user_una', 'quillback')).toBeNull();
    expect(await staff(quill.companyId, 'una')).toEqual([]);
    expect(await syncClerkEvent(joining('vic', { organizationId: 'org_elsewhere' }))).toBe('notOurs');
  });

  it('change the role of who is there already', async () => {
    await syncClerkEvent(joining('wren'));
    await syncClerkEvent(joining('wren', { role: 'owner' }));
    expect(await staff(tern.companyId, 'wren')).toEqual([{ role: 'owner', active: true }]);
  });

  it('ended shut the desk at once; a new one opens it again', async () => {
    const event = joining('piet');
    await syncClerkEvent(event);
    await syncClerkEvent(leaving(event));
    expect(await whoIs('user_piet')).toBeNull();
    await syncClerkEvent(joining('piet', { membershipId: 'orgmem_piet_2' }));
    expect(await whoIs('user_piet')).toMatchObject({ kind: 'member' });
  });

  it('whose end arrives before their beginning stay ended', async () => {
    const event = joining('late');
    await syncClerkEvent(leaving(event));
    await syncClerkEvent(event);
    expect(await whoIs('user_late')).toBeNull();
  });

  it('with a role that nobody knows shut the desk until they have another', async () => {
    const event = joining('ash');
    await syncClerkEvent(event);
    await syncClerkEvent({ ...leaving(event), type: 'membershipShut' });
    expect(await whoIs('user_ash')).toBeNull();
    await syncClerkEvent({ ...event, id: eventId() });
    expect(await whoIs('user_ash')).toMatchObject({ kind: 'member' });
  });

  it('take up the person who has the address already', async () => {
    await syncClerkEvent(joining('nobody', { userId: 'user_other', email: lane.guest.email.toUpperCase() }));
    const rows = await withScope(tern.worker, (tx) =>
      tx.select().from(people).where(eq(people.email, lane.guest.email)),
    );
    expect(rows.map((row) => row.id)).toEqual([lane.guest.personId]);
  });
});

describe('users', () => {
  it('renamed are renamed wherever they are known; a second delivery changes nothing', async () => {
    await syncClerkEvent(joining('ola'));
    await syncClerkEvent(
      joining('ola', {
        organizationId: 'org_quillback',
        membershipId: 'orgmem_q',
        email: 'ola@quillback.example',
      }),
    );
    const event: ClerkEvent = {
      id: eventId(),
      type: 'userSaved',
      userId: 'user_ola',
      email: 'Ola@New.example',
      name: 'Ola Renamed',
    };
    expect(await syncClerkEvent(event)).toBe('synced');
    expect(await syncClerkEvent(event)).toBe('duplicate');
    for (const slug of ['tern-hollow', 'quillback']) {
      expect(await whoIs('user_ola', slug)).toMatchObject({ name: 'Ola Renamed', email: 'ola@new.example' });
    }
  });

  it('who take an address that somebody else here has keep their old one here', async () => {
    await syncClerkEvent(joining('kit'));
    await syncClerkEvent({
      id: eventId(),
      type: 'userSaved',
      userId: 'user_kit',
      email: tern.owner.email,
      name: 'Kit',
    });
    expect(await whoIs('user_kit')).toMatchObject({ email: 'kit@ternhollow.example' });
  });

  it('deleted can no longer be anybody here, and what they did stays theirs', async () => {
    await syncClerkEvent(joining('gus'));
    const before = await whoIs('user_gus');
    await syncClerkEvent({ id: eventId(), type: 'userDeleted', userId: 'user_gus' });
    expect(await whoIs('user_gus')).toBeNull();
    const rows = await withScope(tern.worker, (tx) =>
      tx
        .select()
        .from(people)
        .where(eq(people.id, before?.personId ?? '')),
    );
    expect(rows.map((row) => row.name)).toEqual(['gus']);
  });

  it('whom nobody here knows, and other events, are not ours', async () => {
    const unknown: ClerkEvent = {
      id: eventId(),
      type: 'userSaved',
      userId: 'user_x',
      email: null,
      name: 'x',
    };
    expect(await syncClerkEvent(unknown)).toBe('notOurs');
    expect(await syncClerkEvent({ id: eventId(), type: 'other', name: 'session.created' })).toBe('notOurs');
  });
});
