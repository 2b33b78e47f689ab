import type { ReactNode } from 'react';
import { Button } from '@/components/ui/button';
import { Money } from '@/components/ui/money';
import { Notice } from '@/components/ui/notice';
import { Panel } from '@/components/ui/panel';
import { CallLine, type Contact } from '@/components/ui/states';
import type { DrawView } from '@/lib/contracts/payment';
import { inFull, refundSentence, stateSentence } from './words';

/** A sum in the largest figures with how it stands; on a laptop, what is to be done about it lies beside. */
function Sheet({
  label,
  cents,
  sentence,
  live,
  children,
}: {
  label: string;
  cents: number;
  sentence: string;
  /** Whether a change of the sentence is read out. */
  live?: boolean;
  children?: ReactNode;
}) {
  return (
    <Panel className="grid gap-5 md:grid-cols-[minmax(0,2fr)_minmax(0,3fr)] md:gap-8">
      <div>
        <p className="text-quiet">{label}</p>
        <p className="font-title text-tape font-semibold">
          <Money cents={cents} />
        </p>
        <p className="text-lead" role={live ? 'status' : undefined}>
          {sentence}
        </p>
      </div>
      <div className="grid content-start gap-5">{children}</div>
    </Panel>
  );
}

/** A draw that is not settled, with whatever is to be done about it. */
export function Amount({
  draw,
  sentence = stateSentence(draw),
  children,
}: {
  draw: DrawView;
  sentence?: string;
  children?: ReactNode;
}) {
  return (
    <Sheet label={draw.label} cents={draw.amountCents} sentence={sentence}>
      {children}
    </Sheet>
  );
}

export function Fetching({ draw }: { draw: DrawView }) {
  return (
    <Amount draw={draw}>
      <FetchingForm />
    </Amount>
  );
}

/** Stands where the card form will, at its height, so that nothing moves when it comes. */
export function FetchingForm() {
  return (
    <div className="min-h-[310px]">
      <p role="status" className="text-quiet">
        The card form is being fetched.
      </p>
    </div>
  );
}

export function NotDue({ draw }: { draw: DrawView }) {
  return (
    <Amount draw={draw}>
      <p>There is nothing to pay yet. You will get a mail when it falls due.</p>
    </Amount>
  );
}

export function Paid({ draw }: { draw: DrawView }) {
  const refunded = refundSentence(draw);
  return (
    <Sheet
      label={draw.label}
      cents={draw.receivedCents}
      sentence={draw.paidOn ? `Received on ${inFull(draw.paidOn)}.` : 'Received.'}
      live
    >
      <div className="grid gap-2">
        {draw.receipt && <p>{draw.receipt}.</p>}
        {refunded && <p>{refunded}</p>}
        <p className="text-quiet">The receipt was sent to everyone of the household by mail.</p>
      </div>
    </Sheet>
  );
}

/** After the card was charged: the program's own books are waited for. */
export function Waiting({
  draw,
  contractor,
  looking,
  onLook,
}: {
  draw: DrawView;
  contractor: Contact;
  looking: boolean;
  onLook: () => void;
}) {
  return (
    <Sheet
      label={draw.label}
      cents={draw.amountCents}
      sentence={
        draw.state === 'processing'
          ? 'On its way. The bank can take some days; you will get a mail when it has arrived.'
          : 'Sent. It is being confirmed, which usually takes a few seconds.'
      }
      live
    >
      <p>You need not pay again, and you can leave this page.</p>
      <div>
        <Button tone="quiet" onClick={onLook} disabled={looking}>
          {looking ? 'Looking' : 'Look again'}
        </Button>
      </div>
      <CallLine contact={contractor} />
    </Sheet>
  );
}

/** Something outside is in the way: what it is, what it means for the money, and the way out. */
export function Trouble({
  contractor,
  sentence,
  action,
  onAction,
}: {
  contractor: Contact;
  sentence: string;
  action: string;
  onAction: () => void;
}) {
  return (
    <>
      <Notice kind="caution">
        <p role="status">{sentence}</p>
      </Notice>
      <div>
        <Button onClick={onAction}>{action}</Button>
      </div>
      <CallLine contact={contractor} />
    </>
  );
}

/** Why the last try did not pay. */
export function Declined({ sentence }: { sentence: string }) {
  return (
    <Notice kind="error" title="The payment did not go through">
      {sentence}
    </Notice>
  );
}
