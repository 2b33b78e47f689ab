import { withScope } from '@/db/client';
import { companies } from '@/db/schema';
import { newId } from '@/lib/adapters/ids';
import type { Worker } from '@/lib/contracts/actor';
import { companyInputShape } from '@/lib/contracts/company';
import { faultsOf } from '@/lib/contracts/faults';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { termsShape } from '@/lib/contracts/terms';
import { writeAudit } from '../audit/write';
import { isPlainMark } from './check-mark';
import { findCompanyBySlug } from './find-by-slug';

/** Opens a contractor's room in the program: nobody is in it yet. For set-up; no actor of any company may. */
export async function createCompany(input: unknown): Promise<Result<{ companyId: string }>> {
  const parsed = companyInputShape.safeParse(input);
  if (!parsed.success) {
    return refuse('invalid', 'The company cannot be set up so.', { faults: faultsOf(parsed.error) });
  }
  const { settings, brand, slug } = parsed.data;
  const terms = termsShape.safeParse(settings.terms);
  if (!terms.success) {
    return refuse('invalid', 'The terms cannot be used.', { faults: faultsOf(terms.error) });
  }
  const shares = settings.drawPlan.reduce((sum, draw) => sum + draw.share, 0);
  if (shares !== 1_000_000) {
    return refuse('invalid', `The shares of the payments add up to ${shares / 10_000} %, not to 100 %.`);
  }
  if (brand.markSvg !== null && !isPlainMark(brand.markSvg)) {
    return refuse('invalid', 'The mark is not a plain SVG drawing.');
  }
  if (await findCompanyBySlug(slug)) return refuse('conflict', `There is a company at ${slug} already.`);
  const companyId = newId();
  const worker: Worker = { kind: 'worker', companyId };
  return withScope(worker, async (tx) => {
    await tx.insert(companies).values({ id: companyId, ...parsed.data });
    await writeAudit(tx, worker, {
      verb: 'company.create',
      subject: companyId,
      jobId: null,
      detail: { slug },
    });
    return ok({ companyId });
  });
}
