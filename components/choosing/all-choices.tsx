'use client';

import { Dialog } from '@/components/ui/dialog';
import { LengthText } from '@/components/ui/length';
import type { Edition } from '@/lib/engine/edition-types';
import { answerWords, type Decision } from './decisions';
import type { Draft } from './scheme-edit';

/** Every decision with what stands for it; the picture in words above. A press leads to its blocks. */
export function AllChoices({
  open,
  onOpenChange,
  words,
  edition,
  decisions,
  draft,
  salesperson,
  onPick,
}: {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  words: readonly string[];
  edition: Edition;
  decisions: readonly Decision[];
  draft: Draft;
  salesperson: string;
  onPick: (decision: Decision) => void;
}) {
  const decided = decisions.filter((one) => draft.decided.includes(one.key)).length;
  return (
    <Dialog
      open={open}
      onOpenChange={onOpenChange}
      title={`${decided} of ${decisions.length} decided`}
      about={words.join(' ')}
      wide
    >
      <ul>
        {decisions.map((decision) => (
          <li key={decision.key} className="border-b border-hairline last:border-0">
            <button
              type="button"
              onClick={() => onPick(decision)}
              className="grid min-h-13 w-full grid-cols-[1.5rem_1fr] items-center gap-x-3 py-2 text-left hover:bg-plaster md:grid-cols-[1.5rem_11rem_1fr_auto]"
            >
              <StateMark
                state={
                  draft.decided.includes(decision.key)
                    ? 'decided'
                    : draft.unsure.includes(decision.key)
                      ? 'unsure'
                      : 'open'
                }
              />
              <span className="font-semibold">{decision.title}</span>
              <span className="col-start-2 md:col-start-auto">
                <LengthText text={answerWords(edition, draft.choices, decision.key)} />
              </span>
              <span className="col-start-2 text-note text-quiet md:col-start-auto">
                {draft.decided.includes(decision.key)
                  ? 'decided'
                  : draft.unsure.includes(decision.key)
                    ? `left to ${salesperson}`
                    : `${salesperson} proposes`}
              </span>
            </button>
          </li>
        ))}
      </ul>
    </Dialog>
  );
}

function StateMark({ state }: { state: 'decided' | 'unsure' | 'open' }) {
  return (
    <svg
      viewBox="0 0 20 20"
      className="size-5 text-brand"
      aria-hidden="true"
      fill="none"
      stroke="currentColor"
    >
      {state === 'decided' ? (
        <path d="M3 11 C5 12.5 6.5 14.5 7.5 16.5 C10 11 13 6.5 17.5 3" strokeWidth="2.5" />
      ) : state === 'unsure' ? (
        <>
          <path d="M6.5 7 C6.5 2.5 13.5 2.5 13.5 7 C13.5 10 10 10 10 12.5" strokeWidth="2" />
          <circle cx="10" cy="16.2" r="0.8" fill="currentColor" />
        </>
      ) : (
        <rect x="3.5" y="3.5" width="13" height="13" className="text-quiet" strokeDasharray="3 2" />
      )}
    </svg>
  );
}
