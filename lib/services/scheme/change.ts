import { and, eq, isNull, sql } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { schemeHistory, schemes } from '@/db/schema';
import { now } from '@/lib/adapters/clock';
import type { Actor } from '@/lib/contracts/actor';
import { faultsOf } from '@/lib/contracts/faults';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { schemeChangeShape, type SchemeConflict, type SchemeView } from '@/lib/contracts/scheme';
import { applyChange } from '@/lib/engine/choices';
import { writeAudit } from '../audit/write';
import { loadKitchen, missingSentence } from '../job/load-kitchen';
import { priceChoices } from './price';
import { schemeView } from './view';

/**
 * Changes a scheme on the version that the asking screen saw. Total and fit are computed again here; what is stored
 * is this computation's. Refused with the scheme as it stands when somebody changed it meanwhile, and when the
 * screen showed another total: that is an error of the program, logged and shown. After signing, schemes are
 * drafts for change orders; what is agreed is in the book.
 */
export async function changeScheme(actor: Actor, input: unknown): Promise<Result<SchemeView>> {
  const parsed = schemeChangeShape.safeParse(input);
  if (!parsed.success) {
    return refuse('invalid', 'This change could not be read.', { faults: faultsOf(parsed.error) });
  }
  if (!may(actor.role, 'scheme.write')) {
    return refuse('notAllowed', reasonNot(actor.role, 'scheme.write') ?? 'This is not for you.');
  }
  const { jobId, schemeId, version, changes, decided, unsure, totalCents } = parsed.data;
  const { companyId } = actor;
  return withScope(actor, async (tx) => {
    const kitchen = await loadKitchen(tx, companyId, jobId);
    if (!kitchen) return refuse('notFound', 'There is no such job here.');
    if ('missing' in kitchen) return refuse('conflict', missingSentence(kitchen.missing));
    const own = and(
      eq(schemes.companyId, companyId),
      eq(schemes.jobId, jobId),
      eq(schemes.id, schemeId),
      isNull(schemes.archivedAt),
    );
    const [row] = await tx.select().from(schemes).where(own).for('update');
    if (!row) return refuse('notFound', 'There is no such scheme here.');
    if (row.version !== version) {
      const detail: SchemeConflict = schemeView(row);
      return refuse('conflict', 'This scheme was changed meanwhile. You now see it as it is.', { detail });
    }
    const choices = changes.reduce(applyChange, row.choices);
    const priced = priceChoices(kitchen, choices);
    if (!priced.ok) return priced;
    if (priced.value !== totalCents) {
      console.error(
        `scheme ${schemeId} version ${version}: the screen showed ${totalCents} cents, the server computes ${priced.value} cents for ${JSON.stringify(changes)}`,
      );
      const detail: SchemeConflict = { ...schemeView(row), computedCents: priced.value };
      return refuse(
        'conflict',
        'Your screen and our computation came to different totals, so the change was not kept. Please load the page again.',
        { detail },
      );
    }
    const at = now();
    const [saved] = await tx
      .update(schemes)
      .set({
        choices,
        decided: decided ?? row.decided,
        unsure: unsure ?? row.unsure,
        totalCents,
        version: sql`${schemes.version} + 1`,
        updatedAt: at,
      })
      .where(own)
      .returning();
    if (!saved) throw new Error('The scheme was not stored.');
    await tx.insert(schemeHistory).values({
      companyId,
      jobId,
      schemeId,
      version: saved.version,
      change: changes,
      choices,
      totalCents,
      personId: actor.personId,
      createdAt: at,
    });
    await writeAudit(tx, actor, {
      verb: 'scheme.change',
      subject: schemeId,
      jobId,
      detail: { version: saved.version, totalCents },
    });
    return ok(schemeView(saved));
  });
}
