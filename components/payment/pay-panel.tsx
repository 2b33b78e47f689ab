'use client';

import { lazy, Suspense, useCallback, useEffect, useState } from 'react';
import {
  paymentStartShape,
  paymentViewShape,
  type PaymentStart,
  type PaymentView,
} from '@/lib/contracts/payment';
import { paths } from '@/lib/paths';
import { ask } from './ask';
import type { Outcome } from './card-form';
import { Amount, Declined, Fetching, NotDue, Paid, Trouble, Waiting } from './pay-states';
import { leftover, phaseAfterLook, SENTENCES, type Phase } from './pay-phase';
import { useDraw } from './use-draw';

// Only this page fetches the payment service's libraries, and only once there is something to pay.
const CardForm = lazy(() => import('./card-form'));

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
  const [notice] = useState(() => leftover(initial));
  const draw = useDraw(company, jobId, initial.draw, phase.kind === 'waiting');

  const look = useCallback(
    async (start: PaymentStart | null) => {
      setPhase({ kind: 'looking', start });
      const found = await ask(paymentViewShape, address);
      setPhase(found.kind === 'value' ? phaseAfterLook(found.value, start) : { kind: 'lost', start });
    },
    [address],
  );

  const starting = phase.kind === 'starting' && draw.state === 'due' && reasonNot === null;
  useEffect(() => {
    if (!starting) return;
    let gone = false;
    const begin = async (): Promise<Phase> => {
      const begun = await ask(paymentStartShape, address, 'POST');
      if (begun.kind === 'value') return { kind: 'ready', start: begun.value, notice };
      if (begun.kind === 'lost') return { kind: 'cannot', sentence: SENTENCES.cannotLoad };
      // It may have been paid elsewhere a moment ago.
      const found = await ask(paymentViewShape, address);
      const now = found.kind === 'value' ? phaseAfterLook(found.value, null) : null;
      return now?.kind === 'waiting' ? now : { kind: 'cannot', sentence: begun.sentence };
    };
    void begin().then((next) => gone || setPhase(next));
    return () => {
      gone = true;
    };
  }, [starting, address, notice]);

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
        <p className="mt-5">{reasonNot}</p>
      </Amount>
    );
  }
  if (phase.kind === 'starting') return <Fetching draw={draw} />;
  return (
    <Amount draw={draw}>
      {phase.kind === 'cannot' && (
        <Trouble
          contractor={contractor}
          sentence={phase.sentence}
          action="Try again"
          onAction={() => setPhase({ kind: 'starting' })}
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
      {phase.kind === 'ready' && phase.notice && <Declined sentence={phase.notice} />}
      {start && (
        // Kept while the truth is looked up, so that what was typed is still there.
        <div hidden={phase.kind === 'lost'} className="mt-5">
          <Suspense fallback={<p role="status">The card form is being fetched.</p>}>
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
