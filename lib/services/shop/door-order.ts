import { withScope } from '@/db/client';
import type { Actor } from '@/lib/contracts/actor';
import type { DoorOrder } from '@/lib/contracts/door-order';
import { jobReferenceShape } from '@/lib/contracts/job';
import type { OfferFront } from '@/lib/contracts/offer';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { bodyOf } from '../offer/view';
import { findPages } from '../page/find';
import { momentInWords } from '../page/view';

/** The door order, from the newest sealed page's own text and nothing else. */
export async function readDoorOrder(actor: Actor, input: unknown): Promise<Result<DoorOrder>> {
  const parsed = jobReferenceShape.safeParse(input);
  if (!parsed.success) return refuse('notFound', 'There is no such job here.');
  if (!may(actor.role, 'doorOrder.read')) {
    return refuse('notAllowed', reasonNot(actor.role, 'doorOrder.read') ?? 'This is not for you.');
  }
  const found = await withScope(actor, (tx) => findPages(tx, actor.companyId, parsed.data.jobId));
  if (!found) return refuse('notFound', 'There is no such job here.');
  const sealed = found.rows.filter(({ page }) => page.kind === 'agreement' || page.kind === 'changeOrder');
  const last = sealed[sealed.length - 1];
  if (!last) return refuse('conflict', 'Nothing is sealed yet. The shop builds only from what was signed.');
  const body = bodyOf(last.offer);
  const before = sealed[sealed.length - 2];
  return ok({
    company: body.company.name,
    job: { number: body.job.number, name: body.job.name, address: body.job.address },
    page: last.page.sequence,
    seal: last.page.sha256,
    sealedOn: momentInWords(last.page.sealedAt, found.timeZone),
    rows: body.fronts,
    since: before
      ? { page: before.page.sequence, ...compareFronts(bodyOf(before.offer).fronts, body.fronts) }
      : null,
  });
}

/** Fronts to add, to stop, and to order otherwise, by mark. */
export function compareFronts(
  before: readonly OfferFront[],
  after: readonly OfferFront[],
): { readonly added: string[]; readonly removed: string[]; readonly changed: string[] } {
  const old = new Map(before.map((front) => [front.mark, front]));
  const now = new Map(after.map((front) => [front.mark, front]));
  return {
    added: after.filter((front) => !old.has(front.mark)).map((front) => front.mark),
    removed: before.filter((front) => !now.has(front.mark)).map((front) => front.mark),
    changed: after
      .filter((front) => {
        const was = old.get(front.mark);
        return was !== undefined && JSON.stringify(was) !== JSON.stringify(front);
      })
      .map((front) => front.mark),
  };
}
