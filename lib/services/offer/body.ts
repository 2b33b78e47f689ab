import type { Transaction } from '@/db/client';
import { now } from '@/lib/adapters/clock';
import type { OfferBody } from '@/lib/contracts/offer';
import { draws, ruleSetOf, takeoff as computeTakeoff } from '@/lib/engine';
import type { CalendarDate, Choices, Takeoff } from '@/lib/engine/types';
import { calendarDate } from '../draw/schedule';
import type { Kitchen } from '../job/load-kitchen';
import { countParts, nameChoices, nameFronts } from './named';
import { electronicConsent, noticesFor } from './notices';
import { readSigners } from './signers';

export const DUE_TEXT: Readonly<Record<OfferBody['schedule'][number]['due'], string>> = {
  signing: 'when everyone has signed',
  released: 'when the job is released to the shop',
  materialsIn: 'when the materials are in',
  installing: 'when installation begins',
  walkThrough: 'after the walk-through',
};

/** What is the same on every page of a job: who, where, what is made, by whose rules. */
export type SharedFacts = Omit<
  OfferBody,
  'kind' | 'order' | 'reason' | 'scope' | 'sum' | 'schedule' | 'notices' | 'preparedOn'
>;

/** Today where the company is. */
export const companyToday = (kitchen: Kitchen): CalendarDate => calendarDate(now(), kitchen.company.timeZone);

/** Facts of a set of choices as they are stored and computed now. For a staff or worker scope. */
export async function gatherFacts(
  tx: Transaction,
  kitchen: Kitchen,
  choices: Choices,
): Promise<{ readonly facts: SharedFacts; readonly takeoff: Takeoff }> {
  const { company, job, survey, edition } = kitchen;
  const { settings } = company;
  const takeoff = computeTakeoff(survey, edition, choices, kitchen.terms);
  const facts: SharedFacts = {
    version: 1,
    company: { name: company.name, phone: company.phone, licence: company.licence },
    job: { id: job.id, number: job.number, name: job.name, address: job.address },
    survey: { sha256: kitchen.surveySha256 },
    edition: { number: edition.number, title: edition.title, sha256: kitchen.editionSha256 },
    choices,
    choicesNamed: nameChoices(survey, edition, choices),
    fronts: nameFronts(takeoff, edition),
    parts: countParts(takeoff),
    lines: takeoff.lines.map((line) => ({
      code: line.code,
      label: line.label,
      zone: line.zone,
      quantity: line.quantity,
      quantityText: line.quantityText,
      unitPriceCents: line.unitPrice,
      amountCents: line.amount,
      parts: [...line.parts],
      because: line.because,
    })),
    subtotalCents: takeoff.subtotal,
    discountCents: takeoff.discount,
    taxCents: takeoff.tax,
    totalCents: takeoff.total,
    fitNotes: takeoff.notes.map((note) => ({
      code: note.code,
      parts: [...note.parts],
      text: note.homeowner,
    })),
    stays: [
      'The inside of every cabinet stays as it is: box interiors, shelves, and the undersides of wall cabinets.',
      'Appliances, plumbing, lighting, floors and walls stay as they are, unless a line here says otherwise.',
      ...(choices.kitchen.counter === 'keep' ? ['The counters stay as they are.'] : []),
    ],
    responsibilities: [
      { title: 'Permits', text: settings.permits },
      { title: 'Disconnecting and reconnecting', text: settings.disconnects },
      { title: 'Insurance', text: settings.insurance },
      {
        title: 'Warranty',
        text: `${settings.warrantyYears} ${settings.warrantyYears === 1 ? 'year' : 'years'} on material and work, from the walk-through.`,
      },
    ],
    place: { sale: `The household’s home, ${job.address}`, language: 'English' },
    dates: [
      `Work starts ${settings.startWindow}; the crew’s dates are agreed as a range of days once the materials are in.`,
      takeoff.schedule.because,
    ],
    consent: electronicConsent(company),
    requiredSigners: await readSigners(tx, company.id, job.id),
  };
  return { facts, takeoff };
}

/** The agreement for a set of choices, prepared on a day. For a staff or worker scope. */
export async function buildAgreement(
  tx: Transaction,
  kitchen: Kitchen,
  choices: Choices,
  preparedOn: CalendarDate,
): Promise<{ readonly body: OfferBody; readonly takeoff: Takeoff }> {
  const { facts, takeoff } = await gatherFacts(tx, kitchen, choices);
  const { settings } = kitchen.company;
  const { total } = takeoff;
  const body: OfferBody = {
    ...facts,
    kind: 'agreement',
    preparedOn,
    order: null,
    reason: null,
    scope: [],
    sum: {
      originalCents: total,
      previousOrdersCents: 0,
      beforeCents: 0,
      thisPageCents: total,
      afterCents: total,
    },
    schedule: draws(total, settings.drawPlan, ruleSetOf(settings.ruleSet)).map((draw, index) => {
      const due = settings.drawPlan[index]?.due ?? 'walkThrough';
      return { number: index + 1, label: draw.label, due, dueText: DUE_TEXT[due], amountCents: draw.amount };
    }),
    notices: noticesFor({
      ruleSet: settings.ruleSet,
      survey: kitchen.survey,
      total,
      today: preparedOn,
      kind: 'agreement',
    }),
  };
  return { body, takeoff };
}
