import { and, eq } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { guests, invitations } from '@/db/schema';
import { now } from '@/lib/adapters/clock';
import { sha256 } from '@/lib/adapters/ids';
import type { Guest, Worker } from '@/lib/contracts/actor';
import { tokenShape, type Acceptance } from '@/lib/contracts/invitation';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import type { SignedIn } from '@/lib/contracts/sign-in';
import { writeAudit } from '../audit/write';
import { findCompanyBySlug } from '../company/find-by-slug';
import { savePerson } from '../person/save';
import { invitationState } from './state';

const NONE = 'This invitation cannot be found. Please open the newest mail from your contractor.';

/**
 * Lets a visitor into the job that the link's invitation is for, when the invited address is theirs. Accepting
 * again, also twice at the same moment, answers the same and changes nothing.
 */
export async function acceptInvitation(
  visitor: SignedIn,
  { slug, token }: { readonly slug: string; readonly token: string },
): Promise<Result<Acceptance>> {
  const company = await findCompanyBySlug(slug);
  if (!company || !tokenShape.safeParse(token).success) return refuse('notFound', NONE);
  const companyId = company.id;
  const worker: Worker = { kind: 'worker', companyId };
  const at = now();
  return withScope(worker, async (tx) => {
    const [row] = await tx
      .select()
      .from(invitations)
      .where(and(eq(invitations.companyId, companyId), eq(invitations.tokenHash, sha256(token))))
      .for('update');
    if (!row) return refuse('notFound', NONE);
    const own = visitor.verifiedEmails.some((email) => email.toLowerCase() === row.email);
    if (!own) {
      return refuse(
        'notAllowed',
        `This invitation was sent to ${row.email}. Please sign in with that address, or call ${company.name} at ${company.phone} to have it sent to another.`,
      );
    }
    const state = invitationState(row, at);
    const again = `Please call ${company.name} at ${company.phone} for a new one.`;
    if (state === 'expired') return refuse('conflict', `This invitation is no longer good. ${again}`);
    if (state === 'revoked') return refuse('conflict', `This invitation was taken back. ${again}`);

    const personId = await savePerson(tx, companyId, {
      userId: visitor.userId,
      email: row.email,
      name: visitor.name.trim() || row.name,
    });
    const place = and(
      eq(guests.companyId, companyId),
      eq(guests.jobId, row.jobId),
      eq(guests.personId, personId),
    );
    const [known] = await tx.select().from(guests).where(place);
    if (state === 'accepted') {
      if (known && known.revokedAt === null) return ok({ jobId: row.jobId, company: slug });
      return refuse('conflict', `This invitation was used before and lets nobody in now. ${again}`);
    }
    if (known) await tx.update(guests).set({ revokedAt: null, signer: row.signer }).where(place);
    else await tx.insert(guests).values({ companyId, jobId: row.jobId, personId, signer: row.signer });
    await tx
      .update(invitations)
      .set({ acceptedAt: at })
      .where(and(eq(invitations.companyId, companyId), eq(invitations.id, row.id)));
    const guest: Guest = {
      kind: 'guest',
      companyId,
      jobId: row.jobId,
      personId,
      role: 'homeowner',
      name: row.name,
      email: row.email,
      signer: row.signer,
    };
    await writeAudit(tx, guest, {
      verb: 'invitation.accept',
      subject: row.id,
      jobId: row.jobId,
      detail: { signer: row.signer },
    });
    return ok({ jobId: row.jobId, company: slug });
  });
}
