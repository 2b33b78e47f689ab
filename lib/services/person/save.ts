import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { people } from '@/db/schema';

/** The person with this sign-in, or with this address, or a new one. */
export async function savePerson(
  tx: Transaction,
  companyId: string,
  who: { readonly userId: string; readonly email: string; readonly name: string },
): Promise<string> {
  const email = who.email.toLowerCase();
  const [bySignIn] = await tx
    .select({ id: people.id })
    .from(people)
    .where(and(eq(people.companyId, companyId), eq(people.clerkUserId, who.userId)));
  if (bySignIn) return bySignIn.id;
  const [saved] = await tx
    .insert(people)
    .values({ companyId, email, name: who.name, clerkUserId: who.userId })
    .onConflictDoUpdate({
      target: [people.companyId, people.email],
      set: { clerkUserId: who.userId },
    })
    .returning({ id: people.id });
  if (!saved) throw new Error('The person was not stored.');
  return saved.id;
}
