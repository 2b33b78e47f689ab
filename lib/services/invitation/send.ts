import { and, eq, isNull, sql } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { companies, guests, invitations, jobs, people, schemes } from '@/db/schema';
import { now } from '@/lib/adapters/clock';
import { environment } from '@/lib/adapters/environment';
import { newToken } from '@/lib/adapters/ids';
import { enqueue } from '@/lib/adapters/queue';
import type { Actor } from '@/lib/contracts/actor';
import { faultsOf } from '@/lib/contracts/faults';
import { INVITATION_DAYS, invitationInputShape, type InvitationView } from '@/lib/contracts/invitation';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { paths } from '@/lib/paths';
import { writeAudit } from '../audit/write';
import { invitationView } from './state';

const DAY_MS = 86_400_000;

/** An invitation with the token that its mail carries. The token is nowhere stored and goes to no screen. */
export interface Issued {
  readonly invitation: InvitationView;
  readonly token: string;
}

/**
 * Invites somebody to a job by mail. An earlier open invitation of the same address to the same job ends, so that
 * one link at a time is good. A measured job that has a scheme to show is at choosing from then on.
 */
export async function sendInvitation(actor: Actor, input: unknown): Promise<Result<InvitationView>> {
  const issued = await issueInvitation(actor, input);
  return issued.ok ? ok(issued.value.invitation) : issued;
}

/** As {@link sendInvitation}, and hands the token out; for set-up, where nobody reads the mail. */
export async function issueInvitation(actor: Actor, input: unknown): Promise<Result<Issued>> {
  const parsed = invitationInputShape.safeParse(input);
  if (!parsed.success) {
    return refuse('invalid', 'The invitation needs a name and a mail address.', {
      faults: faultsOf(parsed.error),
    });
  }
  if (!may(actor.role, 'invitation.send')) {
    return refuse('notAllowed', reasonNot(actor.role, 'invitation.send') ?? 'This is not for you.');
  }
  const { jobId, email, name, signer } = parsed.data;
  const { companyId } = actor;
  const at = now();
  return withScope(actor, async (tx) => {
    const [job] = await tx
      .select({ name: jobs.name, stage: jobs.stage, company: companies })
      .from(jobs)
      .innerJoin(companies, eq(companies.id, jobs.companyId))
      .where(and(eq(jobs.companyId, companyId), eq(jobs.id, jobId)))
      .for('update', { of: jobs });
    if (!job) return refuse('notFound', 'There is no such job here.');
    const [already] = await tx
      .select({ name: people.name })
      .from(guests)
      .innerJoin(people, and(eq(people.companyId, guests.companyId), eq(people.id, guests.personId)))
      .where(
        and(
          eq(guests.companyId, companyId),
          eq(guests.jobId, jobId),
          eq(people.email, email),
          isNull(guests.revokedAt),
        ),
      );
    if (already) return refuse('conflict', `${already.name} already sees this job.`);
    await tx
      .update(invitations)
      .set({ revokedAt: at })
      .where(
        and(
          eq(invitations.companyId, companyId),
          eq(invitations.jobId, jobId),
          eq(invitations.email, email),
          isNull(invitations.acceptedAt),
          isNull(invitations.revokedAt),
        ),
      );
    // The invited are people from now on, so that a page can name them before they come.
    await tx.insert(people).values({ companyId, email, name }).onConflictDoNothing();
    const { token, hash } = newToken();
    const [row] = await tx
      .insert(invitations)
      .values({
        companyId,
        jobId,
        email,
        name,
        signer,
        invitedBy: actor.personId,
        tokenHash: hash,
        expiresAt: new Date(at.getTime() + INVITATION_DAYS * DAY_MS),
        createdAt: at,
      })
      .returning();
    if (!row) throw new Error('The invitation was not stored.');
    if (job.stage === 'measured') {
      const [scheme] = await tx
        .select({ id: schemes.id })
        .from(schemes)
        .where(and(eq(schemes.companyId, companyId), eq(schemes.jobId, jobId), isNull(schemes.archivedAt)))
        .limit(1);
      if (scheme) {
        await tx
          .update(jobs)
          .set({ stage: sql`'choosing'` })
          .where(and(eq(jobs.companyId, companyId), eq(jobs.id, jobId)));
      }
    }
    const { company } = job;
    await enqueue(tx, 'mail', {
      companyId,
      to: { name, email },
      subject: `Your kitchen at ${job.name}`,
      text: [
        `${actor.name} of ${company.name} has put your surveyed kitchen where you can see it and choose for it: doors, wood, finish and mouldings, with the price beside every choice.`,
        `Open it with the address below and sign in with ${email}. A code comes to you by mail; you need no password. The invitation is for you alone and is good for ${INVITATION_DAYS} days.`,
        `Questions? Call ${company.name} at ${company.phone}.`,
      ].join('\n\n'),
      action: {
        label: 'See your kitchen',
        url: environment().APP_ORIGIN + paths.invitation(company.slug, token),
      },
    });
    await writeAudit(tx, actor, {
      verb: 'invitation.send',
      subject: row.id,
      jobId,
      detail: { email, signer },
    });
    return ok({ invitation: invitationView(row, at), token });
  });
}
