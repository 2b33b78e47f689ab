import { formatCents } from '@/lib/engine/money';
import { drawName, inFull, type Balance, type DrawView } from '@/lib/contracts/payment';

interface ReceiptFacts {
  readonly contractor: { readonly name: string; readonly phone: string };
  readonly jobName: string;
  readonly draw: DrawView;
  /** What was received, in cents. */
  readonly receivedCents: number;
  /** Calendar date in the company's time zone. */
  readonly receivedOn: string;
  readonly memo: string;
  readonly balance: Balance;
}

/** The words of a receipt, paragraphs parted by an empty line. */
export function composeReceipt(facts: ReceiptFacts): { subject: string; text: string } {
  const { contractor, jobName, draw, receivedCents, receivedOn, memo, balance } = facts;
  const { balanceCents } = balance;
  const rest =
    balanceCents > 0
      ? `After this payment, ${formatCents(balanceCents)} of the agreed sum is still to be paid. Nothing more is due until we tell you.`
      : 'With this payment, everything that was agreed is paid.';
  return {
    subject: `${drawName(draw)} received`,
    text: [
      `We have received ${drawName(draw).toLowerCase()} (${draw.label.toLowerCase()}) for ${jobName}.`,
      `Sum: ${formatCents(receivedCents)}\nReceived: ${inFull(receivedOn)}\nFor: ${memo}`,
      rest,
      `Questions? Call ${contractor.name} at ${contractor.phone}.`,
    ].join('\n\n'),
  };
}
