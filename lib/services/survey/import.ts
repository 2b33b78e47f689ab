import { and, desc, eq } from 'drizzle-orm';
import { z } from 'zod';
import { withScope } from '@/db/client';
import { jobs, surveys } from '@/db/schema';
import { sha256OfJson } from '@/lib/adapters/ids';
import type { Actor } from '@/lib/contracts/actor';
import { faultsOf } from '@/lib/contracts/faults';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { surveyShape } from '@/lib/contracts/survey';
import { writeAudit } from '../audit/write';
import { loadKitchen } from '../job/load-kitchen';
import { repriceSchemes } from '../scheme/reprice';

const inputShape = z.object({ jobId: z.uuid(), survey: z.unknown() });

/**
 * Stores a survey as the job's next version and computes its schemes again. A survey with faults is refused with
 * every one of them by path, and nothing is stored.
 */
export async function importSurvey(
  actor: Actor,
  input: unknown,
): Promise<Result<{ surveyId: string; number: number; sha256: string }>> {
  const parsed = inputShape.safeParse(input);
  if (!parsed.success) return refuse('notFound', 'There is no such job here.');
  if (!may(actor.role, 'survey.import')) {
    return refuse('notAllowed', reasonNot(actor.role, 'survey.import') ?? 'This is not for you.');
  }
  const { jobId } = parsed.data;
  const { companyId } = actor;
  const survey = surveyShape.safeParse(parsed.data.survey);
  if (!survey.success) {
    return refuse('invalid', 'The survey has faults, so nothing was stored.', {
      faults: faultsOf(survey.error),
    });
  }
  const body = survey.data;
  const hash = sha256OfJson(body);
  return withScope(actor, async (tx) => {
    const own = and(eq(jobs.companyId, companyId), eq(jobs.id, jobId));
    const [job] = await tx.select({ stage: jobs.stage }).from(jobs).where(own).for('update');
    if (!job) return refuse('notFound', 'There is no such job here.');
    if (job.stage !== 'measured' && job.stage !== 'choosing') {
      return refuse('conflict', 'This job is signed. What is measured anew comes as a measure revision.');
    }
    const [last] = await tx
      .select({ number: surveys.number })
      .from(surveys)
      .where(and(eq(surveys.companyId, companyId), eq(surveys.jobId, jobId)))
      .orderBy(desc(surveys.number))
      .limit(1);
    const number = (last?.number ?? 0) + 1;
    const [row] = await tx
      .insert(surveys)
      .values({ companyId, jobId, number, body, sha256: hash, createdBy: actor.personId })
      .returning({ id: surveys.id });
    if (!row) throw new Error('The survey was not stored.');
    await tx.update(jobs).set({ surveyId: row.id }).where(own);
    const kitchen = await loadKitchen(tx, companyId, jobId);
    if (kitchen && !('missing' in kitchen)) await repriceSchemes(tx, actor, kitchen);
    await writeAudit(tx, actor, {
      verb: 'survey.import',
      subject: row.id,
      jobId,
      detail: { number, sha256: hash },
    });
    return ok({ surveyId: row.id, number, sha256: hash });
  });
}
