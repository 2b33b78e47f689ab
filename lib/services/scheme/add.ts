import { and, eq, isNull } from 'drizzle-orm';
import { lockJob, type Transaction } from '@/db/client';
import { jobs, schemeHistory, schemes } from '@/db/schema';
import { now } from '@/lib/adapters/clock';
import type { Actor } from '@/lib/contracts/actor';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { SCHEME_LETTERS, type SchemeView } from '@/lib/contracts/scheme';
import type { Choices } from '@/lib/engine/types';
import { schemeView } from './view';

/**
 * Adds a scheme under the job's next free letter, with its first history row. The caller has checked the choices
 * and computed their total (in cents). Refused when all letters are taken.
 */
export async function addScheme(
  tx: Transaction,
  actor: Actor,
  scheme: {
    readonly jobId: string;
    readonly name: (letter: string) => string;
    readonly choices: Choices;
    readonly decided: readonly string[];
    readonly totalCents: number;
    readonly proposed: boolean;
  },
): Promise<Result<SchemeView>> {
  const { companyId } = actor;
  const { jobId, choices, totalCents } = scheme;
  await lockJob(tx, companyId, jobId);
  const taken = await tx
    .select({ letter: schemes.letter })
    .from(schemes)
    .where(and(eq(schemes.companyId, companyId), eq(schemes.jobId, jobId), isNull(schemes.archivedAt)));
  const letter = SCHEME_LETTERS.find((one) => taken.every((row) => row.letter !== one));
  if (!letter) {
    return refuse('conflict', 'A job has six schemes at most. Throw one away to make room for another.');
  }
  const at = now();
  const [row] = await tx
    .insert(schemes)
    .values({
      companyId,
      jobId,
      letter,
      name: scheme.name(letter),
      choices,
      decided: [...scheme.decided],
      unsure: [],
      totalCents,
      proposed: scheme.proposed,
      createdAt: at,
      updatedAt: at,
    })
    .returning();
  if (!row) throw new Error('The scheme was not stored.');
  await tx.insert(schemeHistory).values({
    companyId,
    jobId,
    schemeId: row.id,
    version: row.version,
    change: [],
    choices,
    totalCents,
    personId: actor.personId,
    createdAt: at,
  });
  return ok(schemeView(row));
}

/** The first estimate of a job stays what the first scheme came to. */
export async function keepFirstEstimate(
  tx: Transaction,
  companyId: string,
  jobId: string,
  totalCents: number,
): Promise<void> {
  await tx
    .update(jobs)
    .set({ firstEstimateCents: totalCents })
    .where(and(eq(jobs.companyId, companyId), eq(jobs.id, jobId), isNull(jobs.firstEstimateCents)));
}
