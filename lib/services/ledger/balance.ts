import { and, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import { withScope, type Transaction } from '@/db/client';
import { jobs, ledger } from '@/db/schema';
import type { Actor } from '@/lib/contracts/actor';
import type { Balance } from '@/lib/contracts/payment';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';

/** Sums of a job's ledger in cents; the transaction's scope decides what may be seen. */
export async function sumLedger(tx: Transaction, companyId: string, jobId: string): Promise<Balance> {
  const rows = await tx
    .select({ kind: ledger.kind, cents: sql<string>`sum(${ledger.amountCents})` })
    .from(ledger)
    .where(and(eq(ledger.companyId, companyId), eq(ledger.jobId, jobId)))
    .groupBy(ledger.kind);
  const of = (kind: (typeof rows)[number]['kind']) =>
    Number(rows.find((row) => row.kind === kind)?.cents ?? 0);
  return {
    agreedCents: of('agreement'),
    changesCents: of('changeOrder'),
    paidCents: 0 - of('payment'),
    // A refund that failed is reversed: the money stayed.
    refundedCents: of('refund') + of('reversal'),
    balanceCents: rows.reduce((total, row) => total + Number(row.cents), 0),
  };
}

const inputShape = z.object({ jobId: z.uuid() });

/** What a job's ledger adds up to, in cents. */
export async function readBalance(actor: Actor, input: unknown): Promise<Result<Balance>> {
  const parsed = inputShape.safeParse(input);
  if (!parsed.success) return refuse('invalid', 'This job cannot be found by that address.');
  if (!may(actor.role, 'draw.read')) {
    return refuse('notAllowed', reasonNot(actor.role, 'draw.read') ?? 'This is not for you.');
  }
  const { jobId } = parsed.data;
  return withScope(actor, async (tx) => {
    const [job] = await tx
      .select({ id: jobs.id })
      .from(jobs)
      .where(and(eq(jobs.companyId, actor.companyId), eq(jobs.id, jobId)));
    if (!job) return refuse('notFound', 'There is no such job here.');
    return ok(await sumLedger(tx, actor.companyId, jobId));
  });
}
