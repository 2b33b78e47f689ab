'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { classNames } from '@/components/ui/class-names';
import { Dialog } from '@/components/ui/dialog';
import { Money } from '@/components/ui/money';
import { Notice } from '@/components/ui/notice';
import { sendJson } from '@/components/ui/json';
import { SCHEME_LETTERS, type SchemeView } from '@/lib/contracts/scheme';
import { paths } from '@/lib/paths';

/** The schemes of a job: which one is on the screen, and a copy of it to try something else. */
export function SchemeMenu({
  company,
  jobId,
  schemes,
  current,
  currentCents,
  waiting,
  onPick,
  onAdded,
}: {
  company: string;
  jobId: string;
  schemes: readonly SchemeView[];
  current: string;
  /** The total on the screen, which may be ahead of what is stored. */
  currentCents: number;
  /** Whether edits are still on their way. */
  waiting: boolean;
  onPick: (schemeId: string) => void;
  onAdded: (scheme: SchemeView) => void;
}) {
  const [open, setOpen] = useState(false);
  const [busy, setBusy] = useState(false);
  const [fault, setFault] = useState<string | null>(null);
  const scheme = schemes.find((one) => one.id === current);
  if (!scheme) return null;
  const full = schemes.length >= SCHEME_LETTERS.length;

  async function copy() {
    setBusy(true);
    setFault(null);
    const answer = await sendJson<SchemeView>(paths.api.schemes(company, jobId), 'POST', {
      schemeId: current,
    });
    setBusy(false);
    if (!answer.ok) {
      setFault(answer.fault.sentence);
      return;
    }
    setOpen(false);
    onAdded(answer.value);
  }

  return (
    <>
      <button
        type="button"
        aria-haspopup="dialog"
        onClick={() => setOpen(true)}
        className="flex min-h-target min-w-0 items-center gap-2 rounded-frame px-1 font-semibold hover:bg-plaster"
      >
        <SchemeLetter letter={scheme.letter} chosen />
        <span className="hidden truncate sm:inline">{scheme.name}</span>
        <span className="sr-only">
          {' '}
          (scheme {scheme.letter}, one of {schemes.length})
        </span>
        <svg viewBox="0 0 12 8" className="w-3 shrink-0" aria-hidden="true" fill="none" stroke="currentColor">
          <path d="M1 1.5 L6 6.5 L11 1.5" strokeWidth="1.8" />
        </svg>
      </button>
      <Dialog
        open={open}
        onOpenChange={setOpen}
        title="Schemes"
        about="Each scheme is one set of choices for this kitchen. Trying another costs nothing."
        actions={
          <Button
            tone="quiet"
            disabled={busy}
            reason={
              full
                ? 'Six schemes are the most a kitchen has.'
                : waiting
                  ? 'Your last change is still being sent.'
                  : null
            }
            onClick={() => void copy()}
          >
            {busy ? 'Copying' : `Copy scheme ${scheme.letter} and try another`}
          </Button>
        }
      >
        {fault && (
          <Notice kind="error" className="mb-3">
            {fault}
          </Notice>
        )}
        <ul>
          {schemes.map((one) => (
            <li key={one.id} className="border-b border-hairline last:border-0">
              <button
                type="button"
                aria-current={one.id === current || undefined}
                onClick={() => {
                  setOpen(false);
                  onPick(one.id);
                }}
                className="flex min-h-13 w-full items-center gap-3 py-2 text-left hover:bg-plaster"
              >
                <SchemeLetter letter={one.letter} chosen={one.id === current} />
                <span className="min-w-0 flex-1">
                  <span className={classNames('block', one.id === current && 'font-semibold')}>
                    {one.name}
                  </span>
                  {one.proposed && (
                    <span className="block text-note text-quiet">the contractor’s proposal</span>
                  )}
                </span>
                <Money
                  cents={one.id === current ? currentCents : one.totalCents}
                  className="text-price font-semibold"
                />
              </button>
            </li>
          ))}
        </ul>
      </Dialog>
    </>
  );
}

function SchemeLetter({ letter, chosen }: { letter: string; chosen: boolean }) {
  return (
    <span
      aria-hidden="true"
      className={classNames(
        'grid size-8 shrink-0 place-items-center rounded-frame border font-title text-lead font-semibold',
        chosen ? 'border-brand bg-brand text-on-brand' : 'border-ink/45',
      )}
    >
      {letter}
    </span>
  );
}
