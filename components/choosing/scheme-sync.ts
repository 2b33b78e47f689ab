import { applyEdit, changesBetween, marksBetween, overlap, type Draft, type Edit } from './scheme-edit';

/** A scheme as the server last answered it. */
export interface Stored extends Draft {
  readonly version: number;
  /** Integer cents. */
  readonly totalCents: number;
}

/** The scheme in the browser: what the server holds, what is on its way, what waits. */
export interface Sync {
  readonly stored: Stored;
  readonly sending: Edit | null;
  readonly waiting: readonly Edit[];
  /** Drafts to go back to and forward to. */
  readonly past: readonly Draft[];
  readonly future: readonly Draft[];
  readonly offline: boolean;
  /** Why the server could not just now; tried again when the person asks. */
  readonly trouble: string | null;
  /** Somebody else changed the same thing meanwhile; nothing is sent until one is chosen. */
  readonly conflict: { readonly theirs: Stored } | null;
  /** The server refused for good, with its sentence. */
  readonly refused: string | null;
  /** The server computes another total (integer cents) than this screen: nothing more is sent. */
  readonly mismatch: { readonly hereCents: number; readonly thereCents: number } | null;
  /** Somebody else's change that went together with ours. */
  readonly merged: boolean;
}

export const startSync = (stored: Stored, waiting: readonly Edit[] = []): Sync => ({
  stored,
  sending: null,
  waiting,
  past: [],
  future: [],
  offline: false,
  trouble: null,
  conflict: null,
  refused: null,
  mismatch: null,
  merged: false,
});

const onTop = (stored: Stored, edits: readonly Edit[]): Draft =>
  edits.reduce<Draft>(applyEdit, { choices: stored.choices, decided: stored.decided, unsure: stored.unsure });

const unsent = (sync: Sync): readonly Edit[] =>
  sync.sending ? [sync.sending, ...sync.waiting] : sync.waiting;

/** The stored scheme with the edit that is on its way: what the server is asked to arrive at. */
export const asked = (sync: Sync): Draft => onTop(sync.stored, sync.sending ? [sync.sending] : []);

/** What the person sees: the stored scheme with every edit that is not stored yet. */
export const shown = (sync: Sync): Draft => onTop(sync.stored, unsent(sync));

/** Edits that would be lost with the page. */
export const kept = unsent;

export type SyncEvent =
  | { readonly kind: 'edit'; readonly edit: Edit }
  | { readonly kind: 'undo' | 'redo'; readonly id: string }
  | { readonly kind: 'send' }
  | { readonly kind: 'stored'; readonly stored: Stored }
  /** Without a sentence the connection is gone; with one the server could not, and says so. */
  | { readonly kind: 'lost'; readonly sentence?: string }
  | { readonly kind: 'online' }
  | { readonly kind: 'conflict'; readonly theirs: Stored }
  | { readonly kind: 'refused'; readonly sentence: string }
  | { readonly kind: 'mismatch'; readonly hereCents: number; readonly thereCents: number }
  | { readonly kind: 'keepMine' | 'takeTheirs' | 'drop' }
  | { readonly kind: 'refreshed'; readonly stored: Stored }
  | { readonly kind: 'noticed' }
  | { readonly kind: 'restored'; readonly base: Stored; readonly edits: readonly Edit[] };

/** Whether an edit may be sent now. */
export const maySend = (sync: Sync): boolean =>
  sync.waiting.length > 0 &&
  !sync.sending &&
  !sync.offline &&
  !sync.trouble &&
  !sync.conflict &&
  !sync.mismatch;

/** The scheme after something happened. Pure; what is sent and stored is the caller's doing. */
export function advance(sync: Sync, event: SyncEvent): Sync {
  switch (event.kind) {
    case 'edit':
      return {
        ...sync,
        waiting: [...sync.waiting, event.edit],
        past: [...sync.past, shown(sync)],
        future: [],
        refused: null,
      };
    case 'undo':
    case 'redo':
      return step(sync, event.kind, event.id);
    case 'send': {
      const [next, ...rest] = sync.waiting;
      return next && maySend(sync) ? { ...sync, sending: next, waiting: rest } : sync;
    }
    case 'stored':
      return { ...sync, stored: event.stored, sending: null };
    case 'lost':
      // It may have arrived or not: sent again on the version it was made on, the server tells.
      return {
        ...sync,
        sending: null,
        waiting: unsent(sync),
        offline: event.sentence === undefined,
        trouble: event.sentence ?? null,
      };
    case 'online':
      return { ...sync, offline: false, trouble: null };
    case 'conflict':
      return meet(sync, event.theirs);
    case 'refused':
      // What the server will not take is not shown as if it had.
      return { ...sync, sending: null, waiting: [], refused: event.sentence, past: [], future: [] };
    case 'mismatch':
      return {
        ...sync,
        sending: null,
        waiting: unsent(sync),
        mismatch: { hereCents: event.hereCents, thereCents: event.thereCents },
      };
    case 'keepMine':
      return sync.conflict ? { ...sync, stored: sync.conflict.theirs, conflict: null } : sync;
    case 'takeTheirs':
      return sync.conflict ? startSync(sync.conflict.theirs) : sync;
    case 'drop':
      return startSync(sync.stored);
    case 'refreshed':
      if (event.stored.version <= sync.stored.version) return sync;
      return unsent(sync).length === 0 ? startSync(event.stored) : meet(sync, event.stored);
    case 'restored': {
      // Left behind by an earlier page: made on `base`, met with what the server holds now.
      if (unsent(sync).length > 0) return sync;
      const before = startSync(event.base, event.edits);
      return event.base.version < sync.stored.version
        ? meet(before, sync.stored)
        : { ...before, stored: sync.stored };
    }
    case 'noticed':
      return { ...sync, merged: false, refused: null };
  }
}

function step(sync: Sync, direction: 'undo' | 'redo', id: string): Sync {
  const from = direction === 'undo' ? sync.past : sync.future;
  const target = direction === 'undo' ? from.at(-1) : from[0];
  if (!target) return sync;
  const now = shown(sync);
  const edit: Edit = {
    id,
    label: direction === 'undo' ? 'Undone' : 'Done again',
    changes: changesBetween(now.choices, target.choices),
    marks: marksBetween(now, target),
  };
  return {
    ...sync,
    waiting: [...sync.waiting, edit],
    past: direction === 'undo' ? sync.past.slice(0, -1) : [...sync.past, now],
    future: direction === 'undo' ? [now, ...sync.future] : sync.future.slice(1),
    refused: null,
  };
}

/**
 * The server holds a newer version. An edit of ours that it holds already (its answer got lost) is dropped; what
 * touches other answers than theirs goes on top; what touches the same is for the person to choose.
 */
function meet(sync: Sync, theirs: Stored): Sync {
  const mine = unsent(sync);
  const back = { ...sync, sending: null, waiting: mine };
  const arrived = mine.findIndex(
    (_, index) =>
      changesBetween(onTop(sync.stored, mine.slice(0, index + 1)).choices, theirs.choices).length === 0,
  );
  if (arrived !== -1) return { ...back, stored: theirs, waiting: mine.slice(arrived + 1) };
  const theirChanges = changesBetween(sync.stored.choices, theirs.choices);
  const myChanges = mine.flatMap((edit) => edit.changes);
  if (overlap(theirChanges, myChanges)) return { ...back, conflict: { theirs } };
  return { ...back, stored: theirs, merged: theirChanges.length > 0, past: [], future: [] };
}
