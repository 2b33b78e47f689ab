import { randomUUID } from 'node:crypto';
import { and, eq } from 'drizzle-orm';
import { withScope } from '@/db/client';
import { companies, guests, jobs, people } from '@/db/schema';
import type { Guest } from '@/lib/contracts/actor';
import type { CompanySettings } from '@/lib/contracts/company';
import type { OfferView } from '@/lib/contracts/offer';
import type { Result } from '@/lib/contracts/result';
import type { SchemeView } from '@/lib/contracts/scheme';
import type { ChoiceChange } from '@/lib/engine/types';
import { applyChange } from '@/lib/engine/choices';
import { takeoff } from '@/lib/engine/takeoff';
import { termsOf } from '@/lib/contracts/terms';
import { publishEdition } from '@/lib/services/edition/publish';
import { prepareOffer } from '@/lib/services/offer/prepare';
import { changeScheme } from '@/lib/services/scheme/change';
import { createScheme } from '@/lib/services/scheme/create';
import { signOffer } from '@/lib/services/signature/sign';
import { importSurvey } from '@/lib/services/survey/import';
import { CHOICES, costs, edition, SURVEY } from './kitchen-scene';
import { addContractor, addHousehold, SETTINGS, valueOf, type Contractor, type Household } from './scene';

/** Four payments under Massachusetts' rule set; invented but for the rule set's own figures. */
export const SELLING: CompanySettings = {
  ...SETTINGS,
  ruleSet: 'MA',
  drawPlan: [
    { label: 'Deposit', share: 300_000, due: 'signing' },
    { label: 'Materials are in', share: 400_000, due: 'materialsIn' },
    { label: 'Installation begins', share: 200_000, due: 'installing' },
    { label: 'Walk-through', share: 100_000, due: 'walkThrough' },
  ],
  insurance: 'Insured.',
  permits: 'The contractor gets them.',
  disconnects: 'Licensed trades.',
  startWindow: 'within six weeks',
  salespersonLimitCents: 500,
};

/** A contractor who can sell: settings, a price book with costs. */
export async function addSeller(slug: string): Promise<Contractor> {
  const contractor = await addContractor(slug);
  await withScope(contractor.worker, (tx) =>
    tx.update(companies).set({ settings: SELLING }).where(eq(companies.id, contractor.companyId)),
  );
  valueOf(await publishEdition(contractor.owner, { edition: edition(1), costs: costs(1) }));
  return contractor;
}

export interface Sale extends Household {
  readonly contractor: Contractor;
  /** The second of the household, who signs too. */
  readonly second: Guest;
  readonly scheme: SchemeView;
}

/** A household of two signers with a surveyed kitchen and a proposed scheme. */
export async function addSale(contractor: Contractor): Promise<Sale> {
  const household = await addHousehold(contractor);
  const { jobId, guest } = household;
  const { companyId } = contractor;
  const second: Guest = {
    ...guest,
    personId: randomUUID(),
    name: `${guest.name}, second`,
    email: guest.email.replace('guest', 'second'),
  };
  await withScope(contractor.worker, async (tx) => {
    const [row] = await tx.query.editions.findMany({ limit: 1 });
    await tx
      .update(jobs)
      .set({ editionId: row?.id, stage: 'choosing' })
      .where(and(eq(jobs.companyId, companyId), eq(jobs.id, jobId)));
    const { personId, email, name } = second;
    await tx.insert(people).values({ companyId, id: personId, email, name });
    await tx.insert(guests).values({ companyId, jobId, personId, signer: true });
  });
  valueOf(await importSurvey(contractor.seller, { jobId, survey: SURVEY }));
  const scheme = valueOf(
    await createScheme(contractor.seller, { jobId, name: 'Proposed', choices: CHOICES, decided: [] }),
  );
  return { ...household, contractor, second, scheme };
}

export const signatureOf = (offer: OfferView, jobId: string, text = 'A signature') => ({
  jobId,
  offerId: offer.id,
  sha256: offer.sha256,
  consent: { accepted: true, sha256: offer.body.consent.sha256 },
  means: { kind: 'typed', text },
});

export const prepare = async (sale: Sale): Promise<OfferView> =>
  valueOf(await prepareOffer(sale.guest, { jobId: sale.jobId, schemeId: sale.scheme.id }));

export const sign = (who: Guest, offer: OfferView): Promise<Result<OfferView>> =>
  signOffer(who, signatureOf(offer, who.jobId, who.name));

/** Both sign the agreement; page 1 is sealed. */
export async function sealAgreement(sale: Sale): Promise<OfferView> {
  const offer = await prepare(sale);
  valueOf(await sign(sale.guest, offer));
  return valueOf(await sign(sale.second, offer));
}

/** Changes the sale's scheme as its household would. */
export async function choose(sale: Sale, change: ChoiceChange): Promise<Sale> {
  const { jobId, scheme, guest } = sale;
  const choices = applyChange(scheme.choices, change);
  const totalCents = takeoff(SURVEY, edition(1), choices, termsOf(SELLING)).total;
  const changed = valueOf(
    await changeScheme(guest, {
      jobId,
      schemeId: scheme.id,
      version: scheme.version,
      changes: [change],
      totalCents,
    }),
  );
  return { ...sale, scheme: changed };
}

export const to = (
  option: string,
  key: 'style' | 'species' | 'finish' | 'crown' = 'finish',
): ChoiceChange => ({ key, zone: 'kitchen', option });
