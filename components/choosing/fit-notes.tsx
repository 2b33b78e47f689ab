'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { classNames } from '@/components/ui/class-names';
import { Dialog } from '@/components/ui/dialog';
import { LengthText } from '@/components/ui/length';
import { formatCents } from '@/lib/engine/money';
import type { ChoiceChange, FitNote, Severity } from '@/lib/engine/types';
import { TradeWord } from './trade-word';

const ORDER: readonly Severity[] = ['cannotBeBuilt', 'addsWork', 'information'];
const NAMES: Readonly<Record<Severity, string>> = {
  cannotBeBuilt: 'Cannot be built so',
  addsWork: 'Adds work',
  information: 'For information',
};

export type WayOut = (label: string, changes: readonly ChoiceChange[]) => void;

/** Fit notes, the gravest first. */
export const inOrder = (notes: readonly FitNote[]): FitNote[] =>
  [...notes].sort((a, b) => ORDER.indexOf(a.severity) - ORDER.indexOf(b.severity));

/** The gravest fit note in one line, with its way out; the rest behind a count. It stands beside the work, never on it. */
export function FitNotes({ notes, onWayOut }: { notes: readonly FitNote[]; onWayOut: WayOut }) {
  const [open, setOpen] = useState(false);
  const sorted = inOrder(notes);
  const first = sorted[0];
  if (!first) return null;
  const grave = first.severity !== 'information';
  return (
    <div
      className={classNames(
        'flex items-center gap-x-3 border-t px-3 py-1 md:px-5',
        grave ? 'border-caution/40 bg-caution-ground text-caution' : 'border-hairline text-quiet',
      )}
    >
      <button
        type="button"
        aria-haspopup="dialog"
        onClick={() => setOpen(true)}
        className="min-h-target min-w-0 flex-1 py-1 text-left text-note md:text-label"
      >
        <span className="line-clamp-2">
          <span className="font-semibold">{NAMES[first.severity]}: </span>
          <LengthText text={first.homeowner} />
        </span>
        <span className="font-semibold whitespace-nowrap underline underline-offset-4">
          {sorted.length === 1 ? 'See which' : `All ${sorted.length} fit notes`}
        </span>
      </button>
      {first.wayOut && <WayOutButton note={first} onWayOut={onWayOut} />}
      <Dialog
        open={open}
        onOpenChange={setOpen}
        title="Fit notes"
        about="What the computation found about this kitchen with these choices."
        wide
      >
        <ul className="grid gap-5">
          {sorted.map((note) => (
            <li
              key={`${note.code} ${note.zone} ${note.parts.join(' ')}`}
              className="border-b border-hairline pb-5 last:border-0 last:pb-0"
            >
              <p className={classNames('font-semibold', note.severity !== 'information' && 'text-caution')}>
                {NAMES[note.severity]}
                {note.amount !== undefined && note.amount !== 0 && `, ${formatCents(note.amount)}`}
              </p>
              <p>
                <LengthText text={note.homeowner} />
              </p>
              {note.code === 'crown.filler' && (
                <p className="text-note">
                  <TradeWord word="fillerStrip">What a filler strip is</TradeWord>
                </p>
              )}
              {note.parts.length > 0 && (
                <p className="mt-1 font-mono text-note text-quiet">{note.parts.join('  ')}</p>
              )}
              {note.wayOut && (
                <div className="mt-2">
                  <Button
                    tone="quiet"
                    onClick={() => {
                      setOpen(false);
                      onWayOut(note.wayOut?.label ?? '', note.wayOut?.changes ?? []);
                    }}
                  >
                    <LengthText text={note.wayOut.label} />
                  </Button>
                </div>
              )}
            </li>
          ))}
        </ul>
      </Dialog>
    </div>
  );
}

function WayOutButton({ note, onWayOut }: { note: FitNote; onWayOut: WayOut }) {
  const { wayOut } = note;
  if (!wayOut) return null;
  return (
    <button
      type="button"
      onClick={() => onWayOut(wayOut.label, wayOut.changes)}
      className="min-h-target max-w-36 shrink-0 rounded-frame border border-current px-3 text-note font-semibold md:max-w-none md:text-label"
    >
      <LengthText text={wayOut.label} />
    </button>
  );
}
