import { withScope } from '@/db/client';
import type { Actor } from '@/lib/contracts/actor';
import { faultsOf } from '@/lib/contracts/faults';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { schemeInputShape, type SchemeView } from '@/lib/contracts/scheme';
import { writeAudit } from '../audit/write';
import { loadKitchen, missingSentence } from '../job/load-kitchen';
import { addScheme, keepFirstEstimate } from './add';
import { priceChoices } from './price';

/**
 * Adds a scheme with a whole set of choices. One that the staff adds is the contractor's proposal, and the first
 * of a job sets its first estimate.
 */
export async function createScheme(actor: Actor, input: unknown): Promise<Result<SchemeView>> {
  const parsed = schemeInputShape.safeParse(input);
  if (!parsed.success) {
    return refuse('invalid', 'A scheme needs a name and a choice for everything.', {
      faults: faultsOf(parsed.error),
    });
  }
  if (!may(actor.role, 'scheme.write')) {
    return refuse('notAllowed', reasonNot(actor.role, 'scheme.write') ?? 'This is not for you.');
  }
  const { jobId, name, choices, decided } = parsed.data;
  const { companyId } = actor;
  return withScope(actor, async (tx) => {
    const kitchen = await loadKitchen(tx, companyId, jobId);
    if (!kitchen) return refuse('notFound', 'There is no such job here.');
    if ('missing' in kitchen) return refuse('conflict', missingSentence(kitchen.missing));
    const priced = priceChoices(kitchen, choices);
    if (!priced.ok) return priced;
    const added = await addScheme(tx, actor, {
      jobId,
      name: () => name,
      choices,
      decided,
      totalCents: priced.value,
      proposed: actor.kind === 'member',
    });
    if (!added.ok) return added;
    if (actor.kind === 'member') await keepFirstEstimate(tx, companyId, jobId, priced.value);
    await writeAudit(tx, actor, {
      verb: 'scheme.create',
      subject: added.value.id,
      jobId,
      detail: { letter: added.value.letter, totalCents: priced.value },
    });
    return ok(added.value);
  });
}
