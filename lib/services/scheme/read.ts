import { and, eq } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { schemes } from '@/db/schema';
import type { Actor } from '@/lib/contracts/actor';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { schemeReferenceShape, type SchemeView } from '@/lib/contracts/scheme';
import { schemeView } from './view';

/** One scheme of a job, also one that was thrown away. */
export async function readScheme(actor: Actor, input: unknown): Promise<Result<SchemeView>> {
  const parsed = schemeReferenceShape.safeParse(input);
  if (!parsed.success) return refuse('notFound', 'There is no such scheme here.');
  if (!may(actor.role, 'scheme.read')) {
    return refuse('notAllowed', reasonNot(actor.role, 'scheme.read') ?? 'This is not for you.');
  }
  const { jobId, schemeId } = parsed.data;
  return withScope(actor, async (tx) => {
    const [row] = await tx
      .select()
      .from(schemes)
      .where(and(eq(schemes.companyId, actor.companyId), eq(schemes.jobId, jobId), eq(schemes.id, schemeId)));
    return row ? ok(schemeView(row)) : refuse('notFound', 'There is no such scheme here.');
  });
}
