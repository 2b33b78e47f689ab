import { and, asc, eq, isNull } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { guests, invitations, people } from '@/db/schema';
import type { OfferBody } from '@/lib/contracts/offer';

type Signer = OfferBody['requiredSigners'][number];

/**
 * Whose signatures every page of a job needs: the household's signers, and whoever was invited as one and has not
 * come yet. In the order of their names. For a staff or worker scope.
 */
export async function readSigners(tx: Transaction, companyId: string, jobId: string): Promise<Signer[]> {
  const here = await tx
    .select({ personId: people.id, name: people.name })
    .from(guests)
    .innerJoin(people, and(eq(people.companyId, guests.companyId), eq(people.id, guests.personId)))
    .where(
      and(
        eq(guests.companyId, companyId),
        eq(guests.jobId, jobId),
        eq(guests.signer, true),
        isNull(guests.revokedAt),
      ),
    );
  const invited = await tx
    .select({ personId: people.id, name: people.name })
    .from(invitations)
    .innerJoin(people, and(eq(people.companyId, invitations.companyId), eq(people.email, invitations.email)))
    .where(
      and(
        eq(invitations.companyId, companyId),
        eq(invitations.jobId, jobId),
        eq(invitations.signer, true),
        isNull(invitations.acceptedAt),
        isNull(invitations.revokedAt),
      ),
    )
    .orderBy(asc(people.name));
  const all = new Map([...here, ...invited].map((one) => [one.personId, one]));
  return [...all.values()]
    .sort((a, b) => a.name.localeCompare(b.name, 'en') || a.personId.localeCompare(b.personId))
    .map(({ personId, name }) => ({ personId, name, role: 'homeowner' }));
}
