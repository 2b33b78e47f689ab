import type { ReactNode } from 'react';
import type { DrawView } from '@/lib/contracts/payment';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { Panel } from '@/components/ui/panel';
import { formatCents, inFull, refundSentence, stateSentence } from './words';

interface Contractor {
  readonly name: string;
  readonly phone: string;
}

/** The sum in large figures with what it is for, and whatever is to be done about it beneath. */
export function Amount({ draw, children }: { draw: DrawView; children?: ReactNode }) {
  return (
    <Panel>
      <p className="text-quiet">{draw.label}</p>
      <p className="font-title text-tape tabular-nums">{formatCents(draw.amountCents)}</p>
      <p className="mt-1">{stateSentence(draw)}</p>
      {children}
    </Panel>
  );
}

/** Whom to call; a homeowner who is stuck over money always sees it. */
function Help({ name, phone }: Contractor) {
  return (
    <p className="mt-5">
      Questions? Call {name} at{' '}
      <a className="underline" href={`tel:${phone.replace(/[^\d+]/g, '')}`}>
        {phone}
      </a>
      .
    </p>
  );
}

export function Fetching({ draw }: { draw: DrawView }) {
  return (
    <Amount draw={draw}>
      <p role="status" className="mt-5">
        The card form is being fetched.
      </p>
    </Amount>
  );
}

export function NotDue({ draw }: { draw: DrawView }) {
  return (
    <Amount draw={draw}>
      <p className="mt-5">There is nothing to pay yet. You will get a mail when it falls due.</p>
    </Amount>
  );
}

export function Paid({ draw }: { draw: DrawView }) {
  const refunded = refundSentence(draw);
  return (
    <Panel>
      <p className="text-quiet">{draw.label}</p>
      <p className="font-title text-tape tabular-nums">{formatCents(draw.receivedCents)}</p>
      <p role="status" className="mt-1">
        {draw.paidOn ? `Received on ${inFull(draw.paidOn)}.` : 'Received.'} A receipt was sent by mail.
      </p>
      {draw.receipt && <p className="mt-3 text-quiet">{draw.receipt}</p>}
      {refunded && <p className="mt-3">{refunded}</p>}
    </Panel>
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
  contractor: Contractor;
  looking: boolean;
  onLook: () => void;
}) {
  return (
    <Panel>
      <p className="text-quiet">{draw.label}</p>
      <p className="font-title text-tape tabular-nums">{formatCents(draw.amountCents)}</p>
      <p role="status" className="mt-1">
        {draw.state === 'processing'
          ? 'The bank is still working on it. This can take some days; you will get a mail when it has arrived.'
          : 'The payment was sent and is being confirmed. This usually takes a few seconds.'}
      </p>
      <p className="mt-3">You need not pay again, and you can leave this page.</p>
      <div className="mt-5">
        <Button tone="quiet" onClick={onLook} disabled={looking}>
          {looking ? 'Looking' : 'Look again'}
        </Button>
      </div>
      <Help {...contractor} />
    </Panel>
  );
}

/** Something outside is in the way: what it is, what it means for the money, and the way out. */
export function Trouble({
  contractor,
  sentence,
  action,
  onAction,
}: {
  contractor: Contractor;
  sentence: string;
  action: string;
  onAction: () => void;
}) {
  return (
    <div className="mt-5">
      <Notice kind="caution">{sentence}</Notice>
      <div className="mt-5">
        <Button onClick={onAction}>{action}</Button>
      </div>
      <Help {...contractor} />
    </div>
  );
}

export function Declined({ sentence }: { sentence: string }) {
  return (
    <div role="alert" className="mt-5">
      <Notice kind="caution">{sentence}</Notice>
    </div>
  );
}
