import { and, eq, isNull } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { schemes } from '@/db/schema';
import { now } from '@/lib/adapters/clock';
import type { Actor } from '@/lib/contracts/actor';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { schemeReferenceShape, type SchemeView } from '@/lib/contracts/scheme';
import { writeAudit } from '../audit/write';
import { schemeView } from './view';

/** Throws a scheme away; its letter is free again, its history stays. The last one of a job is kept. */
export async function discardScheme(actor: Actor, input: unknown): Promise<Result<SchemeView>> {
  const parsed = schemeReferenceShape.safeParse(input);
  if (!parsed.success) return refuse('notFound', 'There is no such scheme here.');
  if (!may(actor.role, 'scheme.write')) {
    return refuse('notAllowed', reasonNot(actor.role, 'scheme.write') ?? 'This is not for you.');
  }
  const { jobId, schemeId } = parsed.data;
  return withScope(actor, async (tx) => {
    const ofJob = and(
      eq(schemes.companyId, actor.companyId),
      eq(schemes.jobId, jobId),
      isNull(schemes.archivedAt),
    );
    // All are held, so that two at once do not throw the last two away.
    const rows = await tx.select().from(schemes).where(ofJob).for('update');
    const row = rows.find((one) => one.id === schemeId);
    if (!row) return refuse('notFound', 'There is no such scheme here.');
    if (rows.length === 1)
      return refuse('conflict', 'This is the only scheme. Copy it before you throw it away.');
    const [saved] = await tx
      .update(schemes)
      .set({ archivedAt: now() })
      .where(and(ofJob, eq(schemes.id, schemeId)))
      .returning();
    if (!saved) throw new Error('The scheme was not stored.');
    await writeAudit(tx, actor, {
      verb: 'scheme.discard',
      subject: schemeId,
      jobId,
      detail: { letter: row.letter },
    });
    return ok(schemeView(saved));
  });
}
