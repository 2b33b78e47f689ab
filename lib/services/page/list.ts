import { withScope } from '@/db/client';
import type { Actor } from '@/lib/contracts/actor';
import { jobReferenceShape } from '@/lib/contracts/job';
import type { PageSummary } from '@/lib/contracts/page';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { findPages } from './find';
import { summaryOf } from './view';

/** The pages of a job book in order. */
export async function listPages(actor: Actor, input: unknown): Promise<Result<PageSummary[]>> {
  const parsed = jobReferenceShape.safeParse(input);
  if (!parsed.success) return refuse('notFound', 'There is no such job here.');
  if (!may(actor.role, 'book.read')) {
    return refuse('notAllowed', reasonNot(actor.role, 'book.read') ?? 'This is not for you.');
  }
  const found = await withScope(actor, (tx) => findPages(tx, actor.companyId, parsed.data.jobId));
  if (!found) return refuse('notFound', 'There is no such job here.');
  return ok(found.rows.map(({ page, offer }) => summaryOf(page, offer, found.timeZone)));
}
