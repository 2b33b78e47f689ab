'use client';

import { useCallback, useEffect, useReducer, useRef } from 'react';
import { LOST, sendJson } from '@/components/ui/json';
import { schemeConflictShape, type SchemeView } from '@/lib/contracts/scheme';
import type { Choices } from '@/lib/engine/types';
import { paths } from '@/lib/paths';
import type { Edit } from './scheme-edit';
import { forgetEdits, keepEdits, keptEdits } from './kept-edits';
import {
  advance,
  asked,
  kept,
  maySend,
  startSync,
  type Stored,
  type Sync,
  type SyncEvent,
} from './scheme-sync';

/** How long a lost connection is left alone before the next attempt, in milliseconds. */
const RETRY_AFTER = 5000;

export const storedOf = (scheme: SchemeView): Stored => ({
  choices: scheme.choices,
  decided: scheme.decided,
  unsure: scheme.unsure,
  version: scheme.version,
  totalCents: scheme.totalCents,
});

let made = 0;
/** Tells edits apart within this page; the server counts versions. */
export const editId = (): string => `${Date.now().toString(36)}-${(made += 1)}`;

/**
 * One scheme, edited at once and sent behind. Edits wait in order while one is on its way or the connection is gone,
 * and survive a reload; `totalOf` is what this screen computes and is checked against the server's answer.
 */
export function useScheme({
  company,
  jobId,
  scheme,
  totalOf,
  onStored,
}: {
  company: string;
  jobId: string;
  scheme: SchemeView;
  /** Integer cents. */
  totalOf: (choices: Choices) => number;
  onStored: (scheme: SchemeView) => void;
}): { sync: Sync; tell: (event: SyncEvent) => void; edit: (edit: Omit<Edit, 'id'>) => void } {
  const [sync, tell] = useReducer(advance, scheme, (first) => startSync(storedOf(first)));
  const address = paths.api.scheme(company, jobId, scheme.id);

  // What an earlier page could not send any more.
  useEffect(() => {
    const found = keptEdits(scheme.id);
    if (found) tell({ kind: 'restored', base: found.base, edits: found.edits });
  }, [scheme.id]);

  useEffect(() => {
    if (kept(sync).length > 0) keepEdits(scheme.id, sync.stored, kept(sync));
    else forgetEdits(scheme.id);
  }, [scheme.id, sync]);

  useEffect(() => {
    if (maySend(sync)) tell({ kind: 'send' });
  }, [sync]);

  const sent = useRef<string | null>(null);
  const { sending, stored } = sync;
  useEffect(() => {
    if (!sending || sent.current === sending.id) return;
    sent.current = sending.id;
    const goal = asked(sync);
    const hereCents = totalOf(goal.choices);
    void sendJson<SchemeView>(address, 'PATCH', {
      version: stored.version,
      changes: sending.changes,
      decided: goal.decided,
      unsure: goal.unsure,
      totalCents: hereCents,
    }).then((answer) => {
      sent.current = null;
      if (answer.ok) {
        onStored(answer.value);
        tell({ kind: 'stored', stored: storedOf(answer.value) });
        return;
      }
      const { code, sentence, detail } = answer.fault;
      const conflict = schemeConflictShape.safeParse(detail);
      if (code === 'conflict' && conflict.success) {
        const thereCents = conflict.data.computedCents;
        if (thereCents !== undefined) tell({ kind: 'mismatch', hereCents, thereCents });
        else tell({ kind: 'conflict', theirs: storedOf(conflict.data) });
      } else if (answer.fault === LOST) tell({ kind: 'lost' });
      else if (code === 'unavailable') tell({ kind: 'lost', sentence });
      else tell({ kind: 'refused', sentence });
    });
  }, [address, onStored, sending, stored, sync, totalOf]);

  useEffect(() => {
    if (!sync.offline) return;
    const again = () => tell({ kind: 'online' });
    const timer = setTimeout(again, RETRY_AFTER);
    window.addEventListener('online', again);
    return () => {
      clearTimeout(timer);
      window.removeEventListener('online', again);
    };
  }, [sync.offline]);

  const edit = useCallback(
    (one: Omit<Edit, 'id'>) => tell({ kind: 'edit', edit: { ...one, id: editId() } }),
    [],
  );
  return { sync, tell, edit };
}
