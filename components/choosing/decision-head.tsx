'use client';

import { RadioBlocks } from '@/components/ui/radio-blocks';
import type { ZoneOrKitchen } from '@/lib/engine/types';
import { PLACE_NAMES, type Decision } from './decisions';
import { isTradeWord, TradeWord } from './trade-word';

const SCOPE_NAMES: Readonly<Record<ZoneOrKitchen, string>> = {
  kitchen: 'Whole kitchen',
  wall: 'Wall cabinets',
  base: 'Base cabinets',
  island: 'Island',
  tall: 'Tall cabinets',
};

/** Which decision is at hand, for which part of the kitchen, and the ways on from it. */
export function DecisionHead({
  decision,
  scope,
  scopes,
  status,
  onScope,
  onStep,
}: {
  decision: Decision;
  scope: ZoneOrKitchen;
  scopes: readonly ZoneOrKitchen[];
  status: string;
  onScope: (scope: ZoneOrKitchen) => void;
  onStep: (by: -1 | 1) => void;
}) {
  const place = scopes.length > 1 ? ` of the ${PLACE_NAMES[scope]}` : '';
  return (
    <>
      <div className="min-w-0 flex-1 basis-40">
        <h1 className="font-title text-reading leading-6 font-semibold md:text-lead" aria-live="polite">
          {isTradeWord(decision.key) ? (
            <TradeWord word={decision.key}>{decision.title}</TradeWord>
          ) : (
            decision.title
          )}
          {place}
        </h1>
        <p className="text-note text-quiet">{status}</p>
      </div>
      <div className="flex min-w-0 basis-full items-center justify-between gap-1 lg:basis-auto lg:gap-3">
        <StepButton by={-1} onStep={onStep} />
        {scopes.length > 1 && (
          <RadioBlocks
            label="Where this choice applies"
            blocks={scopes.map((one) => ({ value: one, label: SCOPE_NAMES[one] }))}
            value={scope}
            onChoose={onScope}
            className="flex min-w-0 overflow-x-auto [&>*]:-ml-px [&>*]:shrink-0 [&>*]:text-note [&>*]:first:ml-0 md:[&>*]:text-label"
          />
        )}
        <StepButton by={1} onStep={onStep} />
      </div>
    </>
  );
}

function StepButton({ by, onStep }: { by: -1 | 1; onStep: (by: -1 | 1) => void }) {
  return (
    <button
      type="button"
      aria-label={by < 0 ? 'Previous choice' : 'Next choice'}
      onClick={() => onStep(by)}
      className="grid size-11 shrink-0 place-items-center rounded-frame hover:bg-plaster"
    >
      <svg viewBox="0 0 20 20" className="size-5" aria-hidden="true" fill="none" stroke="currentColor">
        <path d={by < 0 ? 'M13 3 L6 10 L13 17' : 'M7 3 L14 10 L7 17'} strokeWidth="2" />
      </svg>
    </button>
  );
}
