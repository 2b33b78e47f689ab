import { formatCents } from '@/lib/engine/money';
import { drawName, inFull, type Balance, type DrawView } from '@/lib/contracts/payment';

export { drawName, formatCents, inFull };

const WHEN: Readonly<Record<DrawView['due'], string>> = {
  signing: 'when the agreement is signed',
  released: 'when the job goes to the shop',
  materialsIn: 'when the materials are in',
  installing: 'when installing begins',
  walkThrough: 'after the walk-through',
};

/** When a payment falls due, or what became of it, as one sentence. */
export function stateSentence(draw: DrawView): string {
  switch (draw.state) {
    case 'planned':
      return `Due ${WHEN[draw.due]}.`;
    case 'due':
      return 'Due now.';
    case 'processing':
      return 'On its way. The bank has not confirmed it yet.';
    case 'paid':
      return draw.paidOn ? `Paid on ${inFull(draw.paidOn)}.` : 'Paid.';
  }
}

/** What was given back of a payment, or null. */
export function refundSentence({ refundedCents, receivedCents }: DrawView): string | null {
  if (refundedCents <= 0) return null;
  return refundedCents >= receivedCents
    ? `All of it, ${formatCents(refundedCents)}, was given back.`
    : `${formatCents(refundedCents)} of it was given back.`;
}

/** The sum to date: what was agreed, paid and is still open, in full sentences. */
export function balanceSentences(balance: Balance): string[] {
  const { agreedCents, changesCents, paidCents, refundedCents, balanceCents } = balance;
  const sumCents = agreedCents + changesCents;
  if (agreedCents === 0) return ['Nothing is signed yet, so nothing is owed.'];
  const sentences = [
    changesCents === 0
      ? `The agreed sum is ${formatCents(sumCents)}.`
      : `The agreed sum is ${formatCents(sumCents)}: ${formatCents(agreedCents)} by the agreement and ${formatCents(Math.abs(changesCents))} ${changesCents > 0 ? 'more' : 'less'} by change orders.`,
    paidCents === 0 ? 'Nothing has been paid so far.' : `${formatCents(paidCents)} has been paid so far.`,
  ];
  if (refundedCents > 0) sentences.push(`${formatCents(refundedCents)} was given back.`);
  if (balanceCents > 0) sentences.push(`${formatCents(balanceCents)} is still to be paid.`);
  if (balanceCents === 0) sentences.push('Everything is paid.');
  if (balanceCents < 0) sentences.push(`${formatCents(-balanceCents)} is to be given back to you.`);
  return sentences;
}
