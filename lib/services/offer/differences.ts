import type { OfferBody, OfferDifference } from '@/lib/contracts/offer';
import { formatCents } from '@/lib/engine/money';

const money = (cents: number) => formatCents(cents);

type Named = OfferBody['choicesNamed'];

const PLACES: Readonly<Record<Named[number]['zone'], string>> = {
  kitchen: '',
  wall: ' of the wall cabinets',
  base: ' of the base cabinets',
  island: ' of the island or peninsula',
  tall: ' of the tall cabinets',
};

/** Which choices differ, one sentence each. */
export function choiceDifferences(before: Named, after: Named): OfferDifference[] {
  const keyOf = (one: Named[number]) => `${one.label} ${one.zone}`;
  const old = new Map(before.map((one) => [keyOf(one), one]));
  const now = new Map(after.map((one) => [keyOf(one), one]));
  return [...new Set([...old.keys(), ...now.keys()])].flatMap((key) => {
    const a = old.get(key);
    const b = now.get(key);
    const one = b ?? a;
    if (!one || a?.option === b?.option) return [];
    const what = `${one.label}${PLACES[one.zone]}`;
    if (a && b) return [{ text: `${what}: ${b.option} instead of ${a.option}.` }];
    return [{ text: b ? `${what}: ${b.option}.` : `${what}: no longer chosen apart.` }];
  });
}

/** What moved between two offers, in words, for somebody who read the first. */
export function describeDifferences(before: OfferBody, after: OfferBody): OfferDifference[] {
  const found: OfferDifference[] = choiceDifferences(before.choicesNamed, after.choicesNamed);
  const lines = (body: OfferBody) => new Map(body.lines.map((line) => [line.code, line]));
  const oldLines = lines(before);
  const newLines = lines(after);
  for (const code of new Set([...oldLines.keys(), ...newLines.keys()])) {
    const a = oldLines.get(code);
    const b = newLines.get(code);
    const amountCents = (b?.amountCents ?? 0) - (a?.amountCents ?? 0);
    if (amountCents !== 0) found.push({ text: (b ?? a)?.label ?? code, amountCents });
  }
  if (before.taxCents !== after.taxCents)
    found.push({ text: 'Tax', amountCents: after.taxCents - before.taxCents });
  if (before.discountCents !== after.discountCents)
    found.push({ text: 'Discount', amountCents: before.discountCents - after.discountCents });
  if (before.sum.afterCents !== after.sum.afterCents)
    found.push({
      text: `The sum is ${money(after.sum.afterCents)} instead of ${money(before.sum.afterCents)}.`,
    });
  if (before.sum.beforeCents !== after.sum.beforeCents)
    found.push({ text: 'Another page was sealed in between; this one now follows it.' });
  if (before.survey.sha256 !== after.survey.sha256) found.push({ text: 'The kitchen was measured again.' });
  if (before.edition.sha256 !== after.edition.sha256)
    found.push({ text: `Prices come from edition ${after.edition.number} of the price book.` });
  if (JSON.stringify(before.schedule) !== JSON.stringify(after.schedule))
    found.push({ text: 'The payments are different.' });
  if (JSON.stringify(before.requiredSigners) !== JSON.stringify(after.requiredSigners))
    found.push({ text: `It is signed by ${after.requiredSigners.map((one) => one.name).join(' and ')}.` });
  if (JSON.stringify(before.notices) !== JSON.stringify(after.notices))
    found.push({ text: 'The notices or their dates are different.' });
  if (before.consent.sha256 !== after.consent.sha256) found.push({ text: 'The consent reads differently.' });
  if (found.length === 0 && JSON.stringify(before) !== JSON.stringify(after))
    found.push({ text: 'Details that change neither a choice nor a price.' });
  return found;
}
