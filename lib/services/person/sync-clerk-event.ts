import { and, eq, ne } from 'drizzle-orm';
import { withScope, type Transaction } from '@/db/client';
import { companies, members, people, webhookEvents } from '@/db/schema';
import type { Worker } from '@/lib/contracts/actor';
import type { ClerkEvent } from '@/lib/contracts/clerk-event';
import { writeAudit } from '../audit/write';
import { savePerson } from './save';

/** What became of an event. Whatever it was, the sender need not send it again. */
export type Synced = 'synced' | 'duplicate' | 'notOurs';

/**
 * Keeps people and staff in step with the sign-in service. Any event may come twice, and a membership's end may
 * come before its beginning; both leave what one delivery in order would have left.
 */
export async function syncClerkEvent(event: ClerkEvent): Promise<Synced> {
  switch (event.type) {
    case 'userSaved':
    case 'userDeleted':
      return syncUser(event);
    case 'membershipSaved':
    case 'membershipShut':
    case 'membershipDeleted':
      return syncMembership(event);
    case 'other':
      return 'notOurs';
  }
}

/** Stores the event's id; false when it was stored before. */
async function takeEvent(
  tx: Transaction,
  event: { readonly id: string; readonly type: string },
  companyId: string,
): Promise<boolean> {
  const [fresh] = await tx
    .insert(webhookEvents)
    .values({ source: 'clerk', eventId: event.id, companyId, type: event.type })
    .onConflictDoNothing()
    .returning({ eventId: webhookEvents.eventId });
  return fresh !== undefined;
}

type UserEvent = Extract<ClerkEvent, { type: 'userSaved' | 'userDeleted' }>;

async function syncUser(event: UserEvent): Promise<Synced> {
  const known = await withScope({ kind: 'user', key: event.userId }, (tx) =>
    tx
      .select({ companyId: people.companyId, id: people.id })
      .from(people)
      .where(eq(people.clerkUserId, event.userId)),
  );
  if (known.length === 0) return 'notOurs';
  let taken = false;
  for (const { companyId, id } of known) {
    const worker: Worker = { kind: 'worker', companyId };
    await withScope(worker, async (tx) => {
      // One delivery counts once in each company that knows the person.
      if (!(await takeEvent(tx, event, companyId))) return;
      taken = true;
      const changes =
        event.type === 'userDeleted' ? { clerkUserId: null } : await savedChanges(tx, id, event);
      await tx
        .update(people)
        .set(changes)
        .where(and(eq(people.companyId, companyId), eq(people.id, id)));
      await writeAudit(tx, worker, { verb: `person.${event.type}`, subject: id, jobId: null, detail: {} });
    });
  }
  return taken ? 'synced' : 'duplicate';
}

/** Name and address as saved; an address that somebody else of the company has stays with them. */
async function savedChanges(
  tx: Transaction,
  personId: string,
  event: Extract<ClerkEvent, { type: 'userSaved' }>,
): Promise<{ name: string; email?: string }> {
  const email = event.email?.toLowerCase();
  if (!email) return { name: event.name };
  const [other] = await tx
    .select({ id: people.id })
    .from(people)
    .where(and(eq(people.email, email), ne(people.id, personId)));
  return other ? { name: event.name } : { name: event.name, email };
}

type MembershipEvent = Extract<
  ClerkEvent,
  { type: 'membershipSaved' | 'membershipShut' | 'membershipDeleted' }
>;

async function syncMembership(event: MembershipEvent): Promise<Synced> {
  const company = await withScope({ kind: 'organization', key: event.organizationId }, async (tx) => {
    const [row] = await tx
      .select({ id: companies.id })
      .from(companies)
      .where(eq(companies.clerkOrganizationId, event.organizationId));
    return row;
  });
  if (!company) return 'notOurs';
  const worker: Worker = { kind: 'worker', companyId: company.id };
  return withScope(worker, async (tx) => {
    if (!(await takeEvent(tx, event, company.id))) return 'duplicate';
    const ended = { id: `ended/${event.membershipId}`, type: 'membershipEnded' };
    if (event.type !== 'membershipSaved') {
      // What is deleted stays so, even when word of its beginning comes later.
      if (event.type === 'membershipDeleted') await takeEvent(tx, ended, company.id);
      const gone = await tx
        .update(members)
        .set({ active: false })
        .where(and(eq(members.companyId, company.id), eq(members.clerkMembershipId, event.membershipId)))
        .returning({ personId: members.personId });
      for (const { personId } of gone) {
        await writeAudit(tx, worker, { verb: 'member.end', subject: personId, jobId: null, detail: {} });
      }
      return 'synced';
    }
    const [over] = await tx
      .select({ eventId: webhookEvents.eventId })
      .from(webhookEvents)
      .where(and(eq(webhookEvents.source, 'clerk'), eq(webhookEvents.eventId, ended.id)));
    if (over) return 'synced';
    const personId = await savePerson(tx, company.id, event);
    const member = { role: event.role, clerkMembershipId: event.membershipId, active: true };
    await tx
      .insert(members)
      .values({ companyId: company.id, personId, ...member })
      .onConflictDoUpdate({ target: [members.companyId, members.personId], set: member });
    await writeAudit(tx, worker, {
      verb: 'member.save',
      subject: personId,
      jobId: null,
      detail: { role: event.role },
    });
    return 'synced';
  });
}
