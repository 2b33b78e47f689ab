import { federalHolidays } from '@/lib/adapters/holidays';
import { sha256 } from '@/lib/adapters/ids';
import type { OfferBody } from '@/lib/contracts/offer';
import { cancellationDeadline, cancellationRule, ruleSetOf } from '@/lib/engine';
import type { CalendarDate, Cents, Survey } from '@/lib/engine/types';
import { consentText, noticeText } from '@/lib/record/verify';

type Notice = OfferBody['notices'][number];

/** `Tuesday, July 7, 2026`. */
export const dateInWords = (date: CalendarDate): string =>
  new Intl.DateTimeFormat('en-US', { dateStyle: 'full', timeZone: 'UTC' }).format(
    new Date(`${date}T00:00:00Z`),
  );

/**
 * The notices that go with a sale at the household's home signed on `today`, by the company's rule set and this
 * survey. Each names its source and defers to local law.
 */
export function noticesFor({
  ruleSet: id,
  survey,
  total,
  today,
  kind,
}: {
  readonly ruleSet: string;
  readonly survey: Survey;
  readonly total: Cents;
  /** The calendar date where the company is. */
  readonly today: CalendarDate;
  readonly kind: OfferBody['kind'];
}): Notice[] {
  const ruleSet = ruleSetOf(id);
  const notices: Omit<Notice, 'sha256'>[] = [];
  const rule = kind === 'agreement' ? cancellationRule(ruleSet, { total, place: 'home' }) : null;
  if (rule) {
    const year = Number(today.slice(0, 4));
    const until = cancellationDeadline(today, rule, federalHolidays(year, year + 1));
    notices.push({
      code: 'cancel',
      title: 'Your right to cancel',
      text: `This sale is made at your home. You may cancel it without giving a reason until midnight of the ${rule.businessDays === 3 ? 'third' : `${rule.businessDays}th`} business day after the last of you signs. When that is ${dateInWords(today)}, it is midnight of ${dateInWords(until)}; a later signature moves it later. A dated letter or mail to the contractor is enough. What you paid comes back within ${ruleSet.cancellation.refundBusinessDays} business days after that. Saturdays count as business days, Sundays and federal holidays do not.\nComputed from the published rule named here; not legal advice. Your state may give you more. Local law governs.`,
      source: rule.source,
    });
  }
  const isOld = survey.yearBuilt === null || survey.yearBuilt < ruleSet.lead.builtBefore;
  for (const notice of ruleSet.notices) {
    if (notice.code === 'cancel' || notice.code === 'electronic') continue;
    if (notice.code === 'lead' && !isOld) continue;
    if (notice.code === 'changeOrder' && kind === 'changeOrder') continue;
    const { code, title, text, source } = notice;
    notices.push({ code, title, text, source });
  }
  if (survey.appliances.some((one) => one.kind === 'range' || one.kind === 'cooktop'))
    notices.push({
      code: 'range',
      title: 'Heights over the range',
      text: 'Clearances over a range or cooktop are what they are today; doors and mouldings may not lessen them. The appliance’s listing and the local code decide, not this page.',
      source: ruleSet.range.source,
    });
  notices.push(
    {
      code: 'adhesive',
      title: 'While the work is done',
      text: 'Veneer is set with contact adhesive, which is flammable while it dries: flames and pilot lights are put out, the room is aired, and people with breathing trouble stay away. Sanding makes dust; floors and goods are covered.',
      source: 'Common practice; the adhesive’s own label governs.',
    },
    {
      code: 'colour',
      title: 'Colour on a screen is not a sample',
      text: 'Screens show colour differently from one another. Hold a sample of the finish in your own kitchen, by day and by lamp, before you sign.',
      source: 'Common practice.',
    },
  );
  return notices.map((notice) => ({ ...notice, sha256: sha256(noticeText(notice)) }));
}

/** Consent to electronic records, with every element that 15 USC 7001(c) asks for. */
export function electronicConsent(company: {
  readonly name: string;
  readonly phone: string;
}): OfferBody['consent'] {
  const consent = {
    title: 'Electronic records and signatures',
    paragraphs: [
      `You may have this agreement, and every later page of the job book, on paper instead: call ${company.name} at ${company.phone}. Paper costs you nothing.`,
      'This consent covers the records of this job alone: the agreement, change orders, notices, receipts and the closing papers.',
      `You may withdraw it at any time by the same telephone number. Nothing is charged for that; what was signed before stays signed, and later pages come on paper.`,
      `Tell ${company.name} when your mail address changes, so that notices reach you.`,
      'To read and keep these records you need a browser of the last two years, a mail address, and a way to save or print a page. That you read this page and will get its seal by mail shows that you can. If what is needed ever changes, you are told and asked again.',
      'This defers to local law and is not legal advice (15 USC 7001(c)).',
    ],
  };
  return { ...consent, sha256: sha256(consentText(consent)) };
}
