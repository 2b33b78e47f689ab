import { and, desc, eq, inArray } from 'drizzle-orm';
import { withScope, type Transaction } from '@/db/client';
import { changeOrders, offers, pages, people } from '@/db/schema';
import type { Actor } from '@/lib/contracts/actor';
import { ok, refuse, type Result } from '@/lib/contracts/result';
import { may, reasonNot } from '@/lib/contracts/rights';
import { kitchenInputShape, sealedChoicesShape, type KitchenView } from '@/lib/contracts/scheme';
import { loadKitchen, missingSentence } from '../job/load-kitchen';
import { sumLedger } from '../ledger/balance';
import { readSchemes } from './view';

/** All that the choosing screen shows of a job, in one read. */
export async function readKitchen(actor: Actor, input: unknown): Promise<Result<KitchenView>> {
  const parsed = kitchenInputShape.safeParse(input);
  if (!parsed.success) return refuse('notFound', 'There is no such job here.');
  if (!may(actor.role, 'scheme.read')) {
    return refuse('notAllowed', reasonNot(actor.role, 'scheme.read') ?? 'This is not for you.');
  }
  const { jobId } = parsed.data;
  const { companyId, role } = actor;
  return withScope(actor, async (tx) => {
    const kitchen = await loadKitchen(tx, companyId, jobId);
    if (!kitchen) return refuse('notFound', 'There is no such job here.');
    if ('missing' in kitchen) return refuse('conflict', missingSentence(kitchen.missing));
    const { job, company } = kitchen;
    const [salesperson] = await tx
      .select({ name: people.name, email: people.email })
      .from(people)
      .where(and(eq(people.companyId, companyId), eq(people.id, job.salespersonId)));
    if (!salesperson) throw new Error(`Job ${jobId} has no salesperson.`);
    const sealed = await readSealed(tx, companyId, jobId);
    const { agreedCents, changesCents } = await sumLedger(tx, companyId, jobId);
    return ok({
      job: { id: job.id, number: job.number, name: job.name, address: job.address, stage: job.stage },
      company: {
        id: company.id,
        slug: company.slug,
        name: company.name,
        phone: company.phone,
        licence: company.licence,
        timeZone: company.timeZone,
        state: company.state,
        brand: company.brand,
      },
      role,
      surveyId: kitchen.surveyId,
      survey: kitchen.survey,
      editionId: kitchen.editionId,
      edition: kitchen.edition,
      terms: kitchen.terms,
      schemes: await readSchemes(tx, companyId, jobId),
      baselineCents: sealed ? agreedCents + changesCents : job.firstEstimateCents,
      salesperson,
      sealed,
    });
  });
}

/** The newest sealed page that says what is agreed, with its choices. */
async function readSealed(tx: Transaction, companyId: string, jobId: string): Promise<KitchenView['sealed']> {
  const [page] = await tx
    .select({
      sequence: pages.sequence,
      kind: pages.kind,
      body: offers.body,
      ordered: changeOrders.choices,
    })
    .from(pages)
    .innerJoin(offers, and(eq(offers.companyId, pages.companyId), eq(offers.id, pages.offerId)))
    .leftJoin(
      changeOrders,
      and(eq(changeOrders.companyId, offers.companyId), eq(changeOrders.id, offers.changeOrderId)),
    )
    .where(
      and(
        eq(pages.companyId, companyId),
        eq(pages.jobId, jobId),
        inArray(pages.kind, ['agreement', 'changeOrder']),
      ),
    )
    .orderBy(desc(pages.sequence))
    .limit(1);
  if (!page) return null;
  const { sequence, kind } = page;
  if (kind === 'changeOrder' && page.ordered) return { sequence, kind, choices: page.ordered };
  const { choices } = sealedChoicesShape.parse(JSON.parse(page.body));
  return { sequence, kind: kind === 'changeOrder' ? 'changeOrder' : 'agreement', choices };
}
