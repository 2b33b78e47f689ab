import { and, eq, isNull } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { guests, members, people } from '@/db/schema';
import type { Actor } from '@/lib/contracts/actor';
import { findCompanyBySlug } from '../company/find-by-slug';

interface Asking {
  /** The contractor whose pages are asked for. */
  readonly slug: string;
  /** The sign-in service's id of who asks. */
  readonly clerkUserId: string;
  /** The job whose pages are asked for; a homeowner is somebody only there. */
  readonly jobId?: string;
}

const UUID = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/i;

/**
 * Who a signed-in visitor is to a contractor: staff first, else a guest of the job. Null when nobody, which the
 * pages answer with 404.
 */
export async function resolveActor({ slug, clerkUserId, jobId }: Asking): Promise<Actor | null> {
  const company = await findCompanyBySlug(slug);
  if (!company) return null;
  const companyId = company.id;
  const person = await withScope({ kind: 'user', key: clerkUserId, companyId }, async (tx) => {
    const [row] = await tx
      .select({ id: people.id, name: people.name, email: people.email })
      .from(people)
      .where(and(eq(people.companyId, companyId), eq(people.clerkUserId, clerkUserId)));
    return row;
  });
  if (!person) return null;
  const known = { companyId, personId: person.id, name: person.name, email: person.email };
  return withScope({ kind: 'person', key: person.id, companyId }, async (tx) => {
    const [member] = await tx
      .select({ role: members.role })
      .from(members)
      .where(
        and(eq(members.companyId, companyId), eq(members.personId, person.id), eq(members.active, true)),
      );
    if (member) return { kind: 'member', role: member.role, ...known };
    if (!jobId || !UUID.test(jobId)) return null;
    const [guest] = await tx
      .select({ signer: guests.signer })
      .from(guests)
      .where(
        and(
          eq(guests.companyId, companyId),
          eq(guests.personId, person.id),
          eq(guests.jobId, jobId),
          isNull(guests.revokedAt),
        ),
      );
    return guest ? { kind: 'guest', role: 'homeowner', jobId, signer: guest.signer, ...known } : null;
  });
}
