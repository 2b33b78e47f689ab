import { and, desc, eq, isNull } from 'drizzle-orm';
import { lockJob, withScope, type Transaction } from '@/db/client';
import { offers, pages, schemes } from '@/db/schema';
import type { Actor, Worker } from '@/lib/contracts/actor';
import { offerInputShape, type OfferView } from '@/lib/contracts/offer';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import type { Takeoff } from '@/lib/engine/types';
import { writeAudit } from '../audit/write';
import { loadKitchen, missingSentence, type Kitchen } from '../job/load-kitchen';
import { findJob } from '../job/view';
import { buildAgreement, companyToday } from './body';
import { storeOffer, textOf } from './store';
import { bodyOf, viewOffer, type OfferRow } from './view';

export const NO_JOB = 'There is no such job here.';

/** A sentence when something in the takeoff cannot be built, which blocks signing. */
export function blockedSentence(takeoff: Takeoff): string | null {
  const blocking = takeoff.notes.filter((note) => note.severity === 'cannotBeBuilt');
  const [first] = blocking;
  if (!first) return null;
  return `${first.homeowner} Until that is changed this cannot be signed.`;
}

/** The newest agreement of a job, sealed or not. */
export async function newestAgreement(
  tx: Transaction,
  companyId: string,
  jobId: string,
): Promise<OfferRow | undefined> {
  const [row] = await tx
    .select()
    .from(offers)
    .where(and(eq(offers.companyId, companyId), eq(offers.jobId, jobId), eq(offers.kind, 'agreement')))
    .orderBy(desc(offers.createdAt), desc(offers.id))
    .limit(1);
  return row;
}

/**
 * Makes the agreement for a scheme, or answers the one that is there already when nothing moved since. An offer
 * takes the place of the one before it; those who signed that one sign anew.
 */
export async function prepareOffer(actor: Actor, input: unknown): Promise<Result<OfferView>> {
  const parsed = offerInputShape.safeParse(input);
  if (!parsed.success) return refuse('notFound', NO_JOB);
  if (!may(actor.role, 'offer.prepare')) {
    return refuse('notAllowed', reasonNot(actor.role, 'offer.prepare') ?? 'This is not for you.');
  }
  const { jobId, schemeId } = parsed.data;
  const { companyId } = actor;
  const visible = await withScope(actor, (tx) => findJob(tx, companyId, jobId));
  if (!visible) return refuse('notFound', NO_JOB);
  // Signers who were invited and have not come are not for guests to read; facts are gathered by the program.
  const worker: Worker = { kind: 'worker', companyId };
  return withScope(worker, async (tx) => {
    await lockJob(tx, companyId, jobId);
    const kitchen = await loadKitchen(tx, companyId, jobId);
    if (!kitchen) return refuse('notFound', NO_JOB);
    if ('missing' in kitchen) return refuse('conflict', missingSentence(kitchen.missing));
    const [sealed] = await tx
      .select({ sequence: pages.sequence })
      .from(pages)
      .where(and(eq(pages.companyId, companyId), eq(pages.jobId, jobId)))
      .limit(1);
    if (sealed) return refuse('conflict', 'The agreement is sealed. A difference from it is a change order.');
    const [scheme] = await tx
      .select()
      .from(schemes)
      .where(
        and(
          eq(schemes.companyId, companyId),
          eq(schemes.jobId, jobId),
          eq(schemes.id, schemeId),
          isNull(schemes.archivedAt),
        ),
      );
    if (!scheme) return refuse('notFound', 'There is no such scheme here.');
    return renewAgreement(tx, actor, kitchen, scheme, await newestAgreement(tx, companyId, jobId));
  });
}

/** The agreement as the stored facts make it now: the newest one when nothing moved, else a new one after it. */
async function renewAgreement(
  tx: Transaction,
  actor: Actor,
  kitchen: Kitchen,
  scheme: typeof schemes.$inferSelect,
  newest: OfferRow | undefined,
): Promise<Result<OfferView>> {
  const today = companyToday(kitchen);
  const shown = newest && (await viewOffer(tx, newest));
  // Once somebody signed, the dates stay those that they read.
  const preparedOn = newest && shown && shown.signatures.length > 0 ? bodyOf(newest).preparedOn : today;
  const { body, takeoff } = await buildAgreement(tx, kitchen, scheme.choices, preparedOn);
  const blocked = blockedSentence(takeoff);
  if (blocked) return refuse('conflict', blocked);
  if (body.requiredSigners.length === 0)
    return refuse('conflict', 'Nobody is invited yet who signs for the household.');
  const text = textOf(body);
  if (newest && shown && newest.sha256 === text.sha256) return ok(shown);
  const fresh = preparedOn === today ? { body, text } : await freshOf(tx, kitchen, scheme, today);
  const row = await storeOffer(tx, {
    companyId: actor.companyId,
    ...fresh,
    schemeId: scheme.id,
    changeOrderId: null,
    replaces: newest?.id ?? null,
    createdBy: actor.personId,
  });
  await writeAudit(tx, actor, {
    verb: 'offer.prepare',
    subject: row.id,
    jobId: row.jobId,
    detail: { sha256: row.sha256, totalCents: row.totalCents, scheme: scheme.letter },
  });
  return ok(await viewOffer(tx, row));
}

async function freshOf(
  tx: Transaction,
  kitchen: Kitchen,
  scheme: typeof schemes.$inferSelect,
  today: string,
) {
  const { body } = await buildAgreement(tx, kitchen, scheme.choices, today);
  return { body, text: textOf(body) };
}

/** The agreement rebuilt under a signer's hands, after something moved; for the transaction that refuses to sign. */
export { renewAgreement };
