import { formatCents, cents } from './money';
import { count, inch, lower, quantityText } from './words';
import type { Cents, Front, PriceLine, Takeoff } from './types';

/** One reason why two totals differ. The amounts of all reasons add up to the difference. */
export interface Reason {
  readonly text: string;
  readonly amount: Cents;
}

const sign = (amount: number): string => (amount >= 0 ? `+${formatCents(amount)}` : formatCents(amount));

/** Why one takeoff costs more or less than another, line by line, the largest first. */
export function explainDifference(before: Takeoff, after: Takeoff): Reason[] {
  const old = new Map(before.lines.map((line) => [line.code, line]));
  const now = new Map(after.lines.map((line) => [line.code, line]));
  const reasons: Reason[] = [];
  for (const code of new Set([...old.keys(), ...now.keys()])) {
    const a = old.get(code);
    const b = now.get(code);
    const amount = (b?.amount ?? 0) - (a?.amount ?? 0);
    if (amount === 0) continue;
    reasons.push({ text: `${textOf(a, b, before, after)}, ${sign(amount)}`, amount: cents(amount) });
  }
  reasons.sort((a, b) => Math.abs(b.amount) - Math.abs(a.amount));
  const discount = before.discount - after.discount;
  if (discount !== 0) reasons.push({ text: `Discount, ${sign(discount)}`, amount: cents(discount) });
  const tax = after.tax - before.tax;
  if (tax !== 0) reasons.push({ text: `Tax, ${sign(tax)}`, amount: cents(tax) });
  return reasons;
}

function textOf(a: PriceLine | undefined, b: PriceLine | undefined, before: Takeoff, after: Takeoff): string {
  if (!a) return `${b?.label ?? ''}: ${b?.quantityText ?? ''} added`;
  if (!b) return `${a.label}: ${a.quantityText} left out`;
  const parts: string[] = [];
  const label = a.label === b.label ? a.label : `${b.label} instead of ${lower(a.label)}`;
  if (a.quantity !== b.quantity) {
    const more = b.quantity - a.quantity;
    const by = quantityText(b.unit, Math.abs(more));
    parts.push(`${by} ${more > 0 ? 'more' : 'less'}`);
  }
  if (a.unitPrice !== b.unitPrice)
    parts.push(`at ${formatCents(b.unitPrice)} instead of ${formatCents(a.unitPrice)}`);
  const sizes = resized(a, b, before, after);
  if (sizes) parts.push(sizes);
  return parts.length === 0 ? label : `${label}: ${parts.join(', ')}`;
}

/** `11 fronts shorter by 7/16 in`, where fronts of one line changed their height alike or not. */
function resized(a: PriceLine, b: PriceLine, before: Takeoff, after: Takeoff): string | null {
  if (!/^(fronts|slabs)\./.test(b.code)) return null;
  const old = new Map(before.fronts.map((front) => [front.mark, front]));
  const marks = new Set(b.parts.filter((mark) => a.parts.includes(mark)));
  const changes = new Map<number, number>();
  for (const front of after.fronts) {
    const was: Front | undefined = marks.has(front.mark) ? old.get(front.mark) : undefined;
    const change = was ? front.height - was.height : 0;
    if (change !== 0) changes.set(change, (changes.get(change) ?? 0) + 1);
  }
  const texts = [...changes].map(
    ([change, n]) => `${count(n, 'front')} ${change < 0 ? 'shorter' : 'taller'} by ${inch(Math.abs(change))}`,
  );
  return texts.length === 0 ? null : texts.join(', ');
}

/** One step of the sum behind a line. */
export interface Step {
  readonly mark: string;
  readonly formula: string;
}

/** What a price line is made of, part by part (M2). Empty for a line that is not there. */
export function unfoldLine(takeoff: Takeoff, code: string): Step[] {
  const line = takeoff.lines.find((one) => one.code === code);
  if (!line) return [];
  const fronts = new Map(takeoff.fronts.map((front) => [front.mark, front]));
  const panels = new Map(takeoff.panels.map((panel) => [panel.mark, panel]));
  const pieces = new Map(takeoff.mouldings.map((piece) => [piece.mark, piece]));
  const foot = (area: number) => (area / 589_824).toFixed(4);
  const steps = line.parts.map((mark): Step => {
    const front = fronts.get(mark);
    const panel = panels.get(mark);
    const piece = pieces.get(mark);
    if (front && line.unit === 'squareFoot') {
      const exact = foot(front.width * front.height);
      const billed = (front.area / 14_745_600).toFixed(4);
      const least = billed === exact ? '' : `, billed at the least of ${billed} ft²`;
      return { mark, formula: `${inch(front.width)} × ${inch(front.height)} = ${exact} ft²${least}` };
    }
    if (front && /^(hinges|joints|labour-bore)/.test(code))
      return { mark, formula: count(front.hinges, 'hinge') };
    if (panel)
      return {
        mark,
        formula: `${inch(panel.width)} × ${inch(panel.height)} = ${foot(panel.width * panel.height)} ft²`,
      };
    if (piece)
      return {
        mark,
        formula: `back ${inch(piece.backLength)}, front ${inch(piece.frontLength)}: the longer one`,
      };
    return { mark, formula: 'one' };
  });
  return [
    ...steps,
    {
      mark: '',
      formula: `${line.quantityText} × ${formatCents(line.unitPrice)} = ${formatCents(line.amount)}`,
    },
  ];
}

/** A total as the lines that make it, and what is taken off and put on (M2). */
export function unfoldTotal(takeoff: Takeoff): Step[] {
  return [
    ...takeoff.lines.map((line) => ({
      mark: line.code,
      formula: `${line.quantityText} × ${formatCents(line.unitPrice)} = ${formatCents(line.amount)}`,
    })),
    { mark: 'subtotal', formula: formatCents(takeoff.subtotal) },
    { mark: 'discount', formula: formatCents(-takeoff.discount) },
    { mark: 'tax', formula: formatCents(takeoff.tax) },
    { mark: 'total', formula: formatCents(takeoff.total) },
  ];
}
