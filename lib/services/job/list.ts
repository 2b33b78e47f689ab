import { and, count, desc, eq, gt, inArray, isNull, notExists, sql } from 'drizzle-orm';
import { withScope, type Transaction } from '@/db/client';
import {
  changeOrders,
  draws,
  guests,
  invitations,
  jobs,
  ledger,
  offers,
  pages,
  people,
  schemes,
  signatures,
} from '@/db/schema';
import { now } from '@/lib/adapters/clock';
import type { Actor } from '@/lib/contracts/actor';
import { nextStepOf, type DeskJobRow } from '@/lib/contracts/desk';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';

/** All jobs of the company, newest first, each with what it waits for. */
export async function listJobs(actor: Actor): Promise<Result<DeskJobRow[]>> {
  if (!may(actor.role, 'job.list')) {
    return refuse('notAllowed', reasonNot(actor.role, 'job.list') ?? 'This is not for you.');
  }
  return withScope(actor, async (tx) => ok(await rowsOf(tx, actor.companyId)));
}

async function rowsOf(tx: Transaction, companyId: string): Promise<DeskJobRow[]> {
  const list = await tx
    .select({
      id: jobs.id,
      number: jobs.number,
      name: jobs.name,
      address: jobs.address,
      stage: jobs.stage,
      salesperson: people.name,
    })
    .from(jobs)
    .innerJoin(people, and(eq(people.companyId, jobs.companyId), eq(people.id, jobs.salespersonId)))
    .where(eq(jobs.companyId, companyId))
    .orderBy(desc(jobs.number));
  const open = await tx
    .select({ jobId: invitations.jobId, of: count() })
    .from(invitations)
    .where(
      and(
        eq(invitations.companyId, companyId),
        isNull(invitations.acceptedAt),
        isNull(invitations.revokedAt),
        gt(invitations.expiresAt, now()),
      ),
    )
    .groupBy(invitations.jobId);
  const household = await tx
    .select({ jobId: guests.jobId, personId: guests.personId, signer: guests.signer })
    .from(guests)
    .where(and(eq(guests.companyId, companyId), isNull(guests.revokedAt)));
  const waiting = await openOffers(tx, companyId);
  const due = await tx
    .select({ jobId: draws.jobId })
    .from(draws)
    .where(and(eq(draws.companyId, companyId), eq(draws.state, 'due')));
  const orders = await tx
    .select({ jobId: changeOrders.jobId, state: changeOrders.state })
    .from(changeOrders)
    .where(and(eq(changeOrders.companyId, companyId), inArray(changeOrders.state, ['offered', 'signed'])));
  const sums = await tx
    .select({ jobId: ledger.jobId, kind: ledger.kind, cents: sql<string>`sum(${ledger.amountCents})` })
    .from(ledger)
    .where(eq(ledger.companyId, companyId))
    .groupBy(ledger.jobId, ledger.kind);
  const estimates = await tx
    .selectDistinctOn([schemes.jobId], { jobId: schemes.jobId, totalCents: schemes.totalCents })
    .from(schemes)
    .where(and(eq(schemes.companyId, companyId), isNull(schemes.archivedAt)))
    .orderBy(schemes.jobId, desc(schemes.updatedAt));

  return list.map((job): DeskJobRow => {
    const own = <T extends { jobId: string }>(rows: readonly T[]) =>
      rows.filter((row) => row.jobId === job.id);
    const sum = (...kinds: (typeof sums)[number]['kind'][]) =>
      own(sums)
        .filter((row) => kinds.includes(row.kind))
        .reduce((total, row) => total + Number(row.cents), 0);
    const signed = own(sums).some((row) => row.kind === 'agreement');
    const offer = own(waiting)[0];
    const signers = own(household).filter((guest) => guest.signer);
    const nextStep = nextStepOf({
      stage: job.stage,
      openInvitations: own(open)[0]?.of ?? 0,
      guests: own(household).length,
      signaturesMissing: offer
        ? signers.filter((guest) => !offer.signedBy.includes(guest.personId)).length
        : null,
      drawDue: own(due).length > 0,
      orders: own(orders).map((order) => order.state),
    });
    return {
      ...job,
      nextStep,
      sumCents: signed ? sum('agreement', 'changeOrder') : (own(estimates)[0]?.totalCents ?? null),
      signed,
      paidCents: 0 - sum('payment', 'refund', 'reversal'),
    };
  });
}

/** The newest agreement of each job that somebody has signed and that is not sealed, with who signed it. */
async function openOffers(tx: Transaction, companyId: string) {
  const newest = await tx
    .selectDistinctOn([offers.jobId], { jobId: offers.jobId, id: offers.id })
    .from(offers)
    .where(
      and(
        eq(offers.companyId, companyId),
        eq(offers.kind, 'agreement'),
        notExists(
          tx
            .select({ one: sql`1` })
            .from(pages)
            .where(and(eq(pages.companyId, offers.companyId), eq(pages.jobId, offers.jobId))),
        ),
      ),
    )
    .orderBy(offers.jobId, desc(offers.createdAt));
  if (newest.length === 0) return [];
  const rows = await tx
    .select({ offerId: signatures.offerId, personId: signatures.personId })
    .from(signatures)
    .where(
      and(
        eq(signatures.companyId, companyId),
        inArray(
          signatures.offerId,
          newest.map((offer) => offer.id),
        ),
      ),
    );
  return newest
    .map((offer) => ({
      jobId: offer.jobId,
      signedBy: rows.filter((row) => row.offerId === offer.id).map((row) => row.personId),
    }))
    .filter((offer) => offer.signedBy.length > 0);
}
