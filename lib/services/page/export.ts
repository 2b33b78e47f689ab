import { withScope } from '@/db/client';
import type { Actor } from '@/lib/contracts/actor';
import { jobReferenceShape } from '@/lib/contracts/job';
import type { BookFile } from '@/lib/contracts/page';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { findPages } from './find';

/** A job book as a file that anyone can check without us: the stored texts, as they were hashed. */
export async function exportBook(actor: Actor, input: unknown): Promise<Result<BookFile>> {
  const parsed = jobReferenceShape.safeParse(input);
  if (!parsed.success) return refuse('notFound', 'There is no such job here.');
  if (!may(actor.role, 'book.read')) {
    return refuse('notAllowed', reasonNot(actor.role, 'book.read') ?? 'This is not for you.');
  }
  const { jobId } = parsed.data;
  const found = await withScope(actor, (tx) => findPages(tx, actor.companyId, jobId));
  if (!found) return refuse('notFound', 'There is no such job here.');
  return ok({
    format: 'job-book',
    version: 1,
    company: found.company,
    job: jobId,
    jobName: found.name,
    pages: found.rows.map(({ page, offer }) => ({
      sequence: page.sequence,
      sha256: page.sha256,
      envelope: page.envelope,
      offer: offer.body,
    })),
  });
}
