'use client';

import { RadioBlocks } from '@/components/ui/radio-blocks';
import type { ZoneOrKitchen } from '@/lib/engine/types';
import { PLACE_NAMES, type Decision } from './decisions';

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
  unsure,
  salesperson,
  onScope,
  onStep,
  onUnsure,
}: {
  decision: Decision;
  scope: ZoneOrKitchen;
  scopes: readonly ZoneOrKitchen[];
  status: string;
  unsure: boolean;
  salesperson: string;
  onScope: (scope: ZoneOrKitchen) => void;
  onStep: (by: -1 | 1) => void;
  onUnsure: () => void;
}) {
  const place = scopes.length > 1 ? ` of the ${PLACE_NAMES[scope]}` : '';
  return (
    <div className="flex min-w-0 flex-1 flex-wrap items-center gap-x-5 gap-y-1">
      <div className="flex min-w-0 flex-1 basis-64 items-center gap-1">
        <StepButton by={-1} onStep={onStep} />
        <div className="min-w-0 flex-1 md:flex-none">
          <h1 className="font-title text-reading leading-6 font-semibold md:text-lead" aria-live="polite">
            {decision.title}
            {place}
          </h1>
          <p className="text-note text-quiet">{status}</p>
        </div>
        <StepButton by={1} onStep={onStep} />
      </div>
      {scopes.length > 1 && (
        <RadioBlocks
          label="Where this choice applies"
          blocks={scopes.map((one) => ({ value: one, label: SCOPE_NAMES[one] }))}
          value={scope}
          onChoose={onScope}
          className="flex max-w-full overflow-x-auto [&>*]:-ml-px [&>*]:shrink-0 [&>*]:text-label [&>*]:first:ml-0"
        />
      )}
      <button
        type="button"
        aria-pressed={unsure}
        onClick={onUnsure}
        className="min-h-target px-1 text-label underline underline-offset-4 aria-pressed:font-semibold aria-pressed:text-brand"
      >
        {unsure ? `Left to ${salesperson}` : `Not sure, ask ${salesperson}`}
      </button>
    </div>
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
