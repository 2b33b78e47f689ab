import { and, eq, isNull } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { schemes } from '@/db/schema';
import type { Actor } from '@/lib/contracts/actor';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { schemeCopyShape, type SchemeView } from '@/lib/contracts/scheme';
import { writeAudit } from '../audit/write';
import { addScheme } from './add';

/** Copies a scheme under the next free letter. */
export async function duplicateScheme(actor: Actor, input: unknown): Promise<Result<SchemeView>> {
  const parsed = schemeCopyShape.safeParse(input);
  if (!parsed.success) return refuse('notFound', 'There is no such scheme here.');
  if (!may(actor.role, 'scheme.write')) {
    return refuse('notAllowed', reasonNot(actor.role, 'scheme.write') ?? 'This is not for you.');
  }
  const { jobId, schemeId, name } = parsed.data;
  return withScope(actor, async (tx) => {
    const [source] = await tx
      .select()
      .from(schemes)
      .where(
        and(
          eq(schemes.companyId, actor.companyId),
          eq(schemes.jobId, jobId),
          eq(schemes.id, schemeId),
          isNull(schemes.archivedAt),
        ),
      );
    if (!source) return refuse('notFound', 'There is no such scheme here.');
    const added = await addScheme(tx, actor, {
      jobId,
      name: (letter) => name ?? `Scheme ${letter}`,
      choices: source.choices,
      decided: source.decided,
      totalCents: source.totalCents,
      proposed: false,
    });
    if (!added.ok) return added;
    await writeAudit(tx, actor, {
      verb: 'scheme.duplicate',
      subject: added.value.id,
      jobId,
      detail: { from: schemeId, letter: added.value.letter },
    });
    return ok(added.value);
  });
}
