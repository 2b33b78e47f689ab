import { and, desc, eq, isNull } from 'drizzle-orm';
import { z } from 'zod';
import { withScope } from '@/db/client';
import { companies, editionCosts, editions, jobs } from '@/db/schema';
import { sha256OfJson } from '@/lib/adapters/ids';
import type { Actor } from '@/lib/contracts/actor';
import { editionCostsShape, editionShape } from '@/lib/contracts/edition';
import { faultsOf } from '@/lib/contracts/faults';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { writeAudit } from '../audit/write';

/** What a price book's file holds: the edition that homeowners may see, and what it costs the contractor. */
const inputShape = z.strictObject({ edition: editionShape, costs: editionCostsShape });

/**
 * Publishes the next edition of a company's price book. Jobs that are open keep the edition they have; those that have
 * none yet get this one. Faults are told by path, and nothing is stored.
 */
export async function publishEdition(
  actor: Actor,
  input: unknown,
): Promise<Result<{ editionId: string; number: number; sha256: string }>> {
  if (!may(actor.role, 'edition.publish')) {
    return refuse('notAllowed', reasonNot(actor.role, 'edition.publish') ?? 'This is not for you.');
  }
  const parsed = inputShape.safeParse(input);
  if (!parsed.success) {
    return refuse('invalid', 'The edition has faults, so nothing was stored.', {
      faults: faultsOf(parsed.error),
    });
  }
  const { edition, costs } = parsed.data;
  const { companyId } = actor;
  const hash = sha256OfJson(edition);
  return withScope(actor, async (tx) => {
    // Held so that two editions published at the same moment get two numbers.
    await tx.select({ id: companies.id }).from(companies).where(eq(companies.id, companyId)).for('update');
    const [last] = await tx
      .select({ number: editions.number })
      .from(editions)
      .where(eq(editions.companyId, companyId))
      .orderBy(desc(editions.number))
      .limit(1);
    const number = (last?.number ?? 0) + 1;
    const wrong = [
      { path: 'edition.number', value: edition.number },
      { path: 'costs.number', value: costs.number },
    ].filter(({ value }) => value !== number);
    if (wrong.length > 0) {
      return refuse('invalid', 'The edition has faults, so nothing was stored.', {
        faults: wrong.map(({ path }) => ({ path, message: `The next edition is number ${number}.` })),
      });
    }
    const [row] = await tx
      .insert(editions)
      .values({ companyId, number, body: edition, sha256: hash, publishedBy: actor.personId })
      .returning({ id: editions.id });
    if (!row) throw new Error('The edition was not stored.');
    await tx.insert(editionCosts).values({ companyId, editionId: row.id, body: costs });
    await tx
      .update(jobs)
      .set({ editionId: row.id })
      .where(and(eq(jobs.companyId, companyId), isNull(jobs.editionId)));
    await writeAudit(tx, actor, {
      verb: 'edition.publish',
      subject: row.id,
      jobId: null,
      detail: { number, sha256: hash },
    });
    return ok({ editionId: row.id, number, sha256: hash });
  });
}
