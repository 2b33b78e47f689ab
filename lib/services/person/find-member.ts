import { and, asc, eq } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { members, people } from '@/db/schema';
import type { Member } from '@/lib/contracts/actor';

/**
 * A member of a company's staff by mail address, or its first owner when none is given. For commands that a person
 * runs on the server; whoever may run them may act for the company. Null when there is none.
 */
export async function findMember(companyId: string, email?: string): Promise<Member | null> {
  return withScope({ kind: 'worker', companyId }, async (tx) => {
    const wanted = email ? eq(people.email, email.toLowerCase()) : eq(members.role, 'owner');
    const [row] = await tx
      .select({ personId: people.id, name: people.name, email: people.email, role: members.role })
      .from(members)
      .innerJoin(people, and(eq(people.companyId, members.companyId), eq(people.id, members.personId)))
      .where(and(eq(members.companyId, companyId), eq(members.active, true), wanted))
      .orderBy(asc(members.createdAt))
      .limit(1);
    return row ? { kind: 'member', companyId, ...row } : null;
  });
}
