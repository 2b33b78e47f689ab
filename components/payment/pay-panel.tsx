'use client';

import { lazy, Suspense, useCallback, useEffect, useState } from 'react';
import {
  paymentStartShape,
  paymentViewShape,
  type PaymentStart,
  type PaymentView,
} from '@/lib/contracts/payment';
import { readJson, sendJson } from '@/components/ui/json';
import { paths } from '@/lib/paths';
import type { Outcome } from './card-form';
import { Amount, Declined, Fetching, FetchingForm, NotDue, Paid, Trouble, Waiting } from './pay-states';
import { phaseAfterLook, SENTENCES, type Phase } from './pay-phase';
import { useDraw } from './use-draw';

// Only this page fetches the payment service's libraries, and only once there is something to pay.
const CardForm = lazy(() => import('./card-form'));

/** The truth from the payment service, or null when it cannot be had just now. */
async function lookUp(address: string): Promise<PaymentView | null> {
  try {
    return paymentViewShape.parse(await readJson(address));
  } catch {
    return null;
  }
}

/** Gets the card form ready, or finds out why not. */
async function begin(address: string, notice: string | null): Promise<Phase> {
  const begun = await sendJson(address, 'POST', {});
  if (begun.ok) return { kind: 'ready', start: paymentStartShape.parse(begun.value), notice };
  // It may have been paid elsewhere a moment ago.
  const found = begun.fault.code === 'conflict' ? await lookUp(address) : null;
  const now = found && phaseAfterLook(found, null);
  return now?.kind === 'waiting' ? now : { kind: 'cannot', sentence: begun.fault.sentence };
}

interface Props {
  /** The contractor's slug. */
  readonly company: string;
  readonly jobId: string;
  readonly contractor: { readonly name: string; readonly phone: string };
  /** Why this visitor may not pay, or null. */
  readonly reasonNot: string | null;
  readonly initial: PaymentView;
}

/**
 * Pays one draw. What is shown as paid is what the webhook has posted; this browser only waits for it, and looks
 * the truth up whenever it lost sight of its payment.
 */
export function PayPanel({ company, jobId, contractor, reasonNot, initial }: Props) {
  const drawId = initial.draw.id;
  const address = paths.api.drawPayment(company, jobId, drawId);
  const [phase, setPhase] = useState<Phase>(() => phaseAfterLook(initial, null));
  const draw = useDraw(company, jobId, initial.draw, phase.kind === 'waiting');

  const look = useCallback(
    async (start: PaymentStart | null) => {
      setPhase({ kind: 'looking', start });
      const found = await lookUp(address);
      setPhase(found ? phaseAfterLook(found, start) : { kind: 'lost', start });
    },
    [address],
  );

  const starts = phase.kind === 'starting' && draw.state === 'due' && reasonNot === null;
  const earlier = phase.kind === 'starting' ? phase.notice : null;
  useEffect(() => {
    if (!starts) return;
    let gone = false;
    const cannot: Phase = { kind: 'cannot', sentence: SENTENCES.cannotLoad };
    void begin(address, earlier)
      .catch(() => cannot)
      .then((next) => gone || setPhase(next));
    return () => {
      gone = true;
    };
  }, [starts, address, earlier]);

  // Back online, the question that got lost is asked again by itself.
  const lostStart = phase.kind === 'lost' ? phase.start : undefined;
  useEffect(() => {
    if (lostStart === undefined) return;
    const again = () => void look(lostStart);
    window.addEventListener('online', again);
    return () => window.removeEventListener('online', again);
  }, [lostStart, look]);

  const cannotLoad = useCallback(() => setPhase({ kind: 'cannot', sentence: SENTENCES.cannotLoad }), []);

  function conclude(start: PaymentStart, outcome: Outcome): void {
    if (outcome.kind === 'sent') setPhase({ kind: 'waiting' });
    else if (outcome.kind === 'unknown') void look(start);
    else setPhase({ kind: 'ready', start, notice: outcome.kind === 'declined' ? outcome.sentence : null });
  }

  if (draw.state === 'paid') return <Paid draw={draw} />;
  if (draw.state === 'planned') return <NotDue draw={draw} />;
  const start = 'start' in phase ? phase.start : null;
  const waiting =
    draw.state === 'processing' || phase.kind === 'waiting' || (phase.kind === 'looking' && !start);
  if (waiting) {
    return (
      <Waiting
        draw={draw}
        contractor={contractor}
        looking={phase.kind === 'looking'}
        onLook={() => void look(null)}
      />
    );
  }
  if (reasonNot !== null) {
    return (
      <Amount draw={draw}>
        <p>{reasonNot}</p>
      </Amount>
    );
  }
  if (phase.kind === 'starting') return <Fetching draw={draw} />;
  // A change order has drawn up the schedule anew while the form was open.
  const moved = phase.kind === 'ready' && phase.start.draw.amountCents !== draw.amountCents;
  return (
    <Amount draw={draw} sentence={phase.kind === 'lost' ? 'Not known yet.' : undefined}>
      {phase.kind === 'cannot' && (
        <Trouble
          contractor={contractor}
          sentence={phase.sentence}
          action="Try again"
          onAction={() => setPhase({ kind: 'starting', notice: null })}
        />
      )}
      {phase.kind === 'lost' && (
        <Trouble
          contractor={contractor}
          sentence={SENTENCES.lost}
          action="Look again"
          onAction={() => void look(phase.start)}
        />
      )}
      {moved && (
        <Trouble
          contractor={contractor}
          sentence={SENTENCES.moved}
          action="Go on with the new sum"
          onAction={() => setPhase({ kind: 'starting', notice: null })}
        />
      )}
      {phase.kind === 'ready' && !moved && phase.notice && <Declined sentence={phase.notice} />}
      {start && !moved && (
        // Kept while the truth is looked up, so that what was typed is still there.
        <div hidden={phase.kind === 'lost'}>
          <Suspense fallback={<FetchingForm />}>
            <CardForm
              start={start}
              returnPath={paths.payment(company, jobId, drawId)}
              busy={phase.kind === 'asking' || phase.kind === 'looking'}
              onSend={() => setPhase({ kind: 'asking', start })}
              onOutcome={(outcome) => conclude(start, outcome)}
              onCannotLoad={cannotLoad}
            />
          </Suspense>
        </div>
      )}
    </Amount>
  );
}
