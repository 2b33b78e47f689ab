import type { Transaction } from '@/db/client';
import type { OfferBody } from '@/lib/contracts/offer';
import { refuse, type Result } from '@/lib/contracts/result';
import type { JobStage } from '@/lib/contracts/states';
import { changePrice, contractArithmetic, drawsAfterOrder, explainDifference, takeoff } from '@/lib/engine';
import { cents, formatCents } from '@/lib/engine/money';
import type { CalendarDate, Choices, Takeoff } from '@/lib/engine/types';
import type { Kitchen } from '../job/load-kitchen';
import { DUE_TEXT, gatherFacts } from '../offer/body';
import { choiceDifferences } from '../offer/differences';
import { noticesFor } from '../offer/notices';
import type { sealedBodies, DrawRow } from './find';

const BEFORE_RELEASE: readonly JobStage[] = ['measured', 'choosing', 'signed'];

export interface OrderBody {
  readonly body: OfferBody;
  readonly takeoff: Takeoff;
  readonly signed: Takeoff;
}

/** The difference that an order makes to what is sealed, as its signers read it. For a staff or worker scope. */
export async function buildChangeOrder(
  tx: Transaction,
  kitchen: Kitchen,
  order: { readonly number: number; readonly reason: string; readonly choices: Choices },
  sealed: Awaited<ReturnType<typeof sealedBodies>>,
  schedule: readonly DrawRow[],
  preparedOn: CalendarDate,
): Promise<Result<OrderBody>> {
  const first = sealed[0];
  const last = sealed[sealed.length - 1];
  if (!first || !last)
    return refuse('conflict', 'Nothing is signed yet; before that, choices are simply changed.');
  const { survey, edition, terms, job } = kitchen;
  const { facts, takeoff: wanted } = await gatherFacts(tx, kitchen, order.choices);
  const signed = takeoff(survey, edition, last.body.choices, terms);
  const price = changePrice(signed, wanted, edition, !BEFORE_RELEASE.includes(job.stage));
  const original = cents(first.body.sum.afterCents);
  const sum = contractArithmetic(
    original,
    sealed.slice(1).map((page) => cents(page.body.sum.thisPageCents)),
    price.amount,
  );
  const shared = shareOut(schedule, price.amount);
  if (!shared)
    return refuse(
      'conflict',
      `This change gives back more than is still open to be paid. Please call ${kitchen.company.name} at ${kitchen.company.phone}.`,
    );
  const scope = [
    ...choiceDifferences(last.body.choicesNamed, facts.choicesNamed).map((one) => one.text),
    ...explainDifference(signed, wanted).map((reason) => `${reason.text}.`),
    ...price.charges.map(
      (charge) =>
        `Already ordered and no longer wanted: ${charge.marks.join(', ')}. Restocking, ${formatCents(charge.amount)}.`,
    ),
  ];
  const days = wanted.schedule.readyBusinessDays - signed.schedule.readyBusinessDays;
  const body: OfferBody = {
    ...facts,
    kind: 'changeOrder',
    preparedOn,
    order: { number: order.number, basedOn: last.sequence },
    reason: order.reason,
    scope: scope.length > 0 ? scope : ['No line of the price changes.'],
    dates: [
      days === 0
        ? 'The date on which the material is ready does not move.'
        : `The material is ready ${Math.abs(days)} business ${Math.abs(days) === 1 ? 'day' : 'days'} ${days > 0 ? 'later' : 'earlier'}.`,
      ...facts.dates,
    ],
    sum: {
      originalCents: sum.original,
      previousOrdersCents: sum.netOfPrevious,
      beforeCents: sum.before,
      thisPageCents: sum.thisOrder,
      afterCents: sum.after,
    },
    schedule: shared.map(({ draw, amountCents }) => ({
      number: draw.number,
      label: draw.label,
      due: draw.due,
      dueText: draw.state === 'paid' ? 'paid' : DUE_TEXT[draw.due],
      amountCents,
    })),
    notices: noticesFor({
      ruleSet: kitchen.company.settings.ruleSet,
      survey,
      total: wanted.total,
      today: preparedOn,
      kind: 'changeOrder',
    }),
  };
  return { ok: true, value: { body, takeoff: wanted, signed } };
}

/**
 * The schedule after an order: the difference goes to the payments that are not due yet, or, when there is none, to
 * those that are not paid. `null` when a credit is larger than they are.
 */
export function shareOut(
  schedule: readonly DrawRow[],
  amount: ReturnType<typeof cents>,
): { readonly draw: DrawRow; readonly amountCents: number }[] | null {
  const planned = schedule.filter((draw) => draw.state === 'planned');
  const open = planned.length > 0 ? planned : schedule.filter((draw) => draw.state === 'due');
  if (open.length === 0)
    return amount === 0 ? schedule.map((draw) => ({ draw, amountCents: draw.amountCents })) : null;
  const after = drawsAfterOrder(
    open.map((draw) => cents(draw.amountCents)),
    amount,
  );
  if (after.some((one) => one < 0)) return null;
  return schedule.map((draw) => ({ draw, amountCents: after[open.indexOf(draw)] ?? draw.amountCents }));
}
