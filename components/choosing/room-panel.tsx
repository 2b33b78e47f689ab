'use client';

import { useState, type ReactNode } from 'react';
import type { Edition } from '@/lib/engine/edition-types';
import type { Choices, Massing, Survey, ZoneOrKitchen } from '@/lib/engine/types';
import type { Part } from './decisions';

export type PickPart = (part: Part, zone: ZoneOrKitchen, mark: string | null) => void;

/** The picture of the kitchen: room view or drawn wall, the scheme's tools above, what was found about it beneath. */
export function RoomPanel({
  words,
  tools,
  foot,
}: {
  massing: Massing;
  survey: Survey;
  edition: Edition;
  choices: Choices;
  wall: string;
  /** The picture in words. */
  words: readonly string[];
  onPart: PickPart;
  tools: ReactNode;
  foot: ReactNode;
}) {
  const [view, setView] = useState<'room' | 'wall'>('room');
  return (
    <section
      aria-label="Your kitchen"
      className="grid min-w-0 grid-rows-[auto_minmax(11rem,1fr)_auto] overflow-hidden rounded-frame border border-hairline bg-panel"
    >
      <div className="flex min-w-0 items-center gap-x-1 border-b border-hairline px-1 md:gap-x-3 md:px-4">
        {tools}
        <ViewSwitch view={view} onView={setView} />
      </div>
      <figure className="relative min-h-0 min-w-0">
        <figcaption className="sr-only">{words.join(' ')}</figcaption>
      </figure>
      <div className="max-h-48 overflow-y-auto">{foot}</div>
    </section>
  );
}

function ViewSwitch({ view, onView }: { view: 'room' | 'wall'; onView: (view: 'room' | 'wall') => void }) {
  const other = view === 'room' ? 'wall' : 'room';
  return (
    <button
      type="button"
      onClick={() => onView(other)}
      className="flex min-h-target min-w-target items-center justify-center gap-2 rounded-frame px-2 text-label hover:bg-plaster"
    >
      <svg viewBox="0 0 24 24" className="size-6" aria-hidden="true" fill="none" stroke="currentColor">
        {other === 'wall' ? (
          <path
            d="M3 4.5 H21 M4.5 6.5 H11 V12.5 H4.5 Z M13 6.5 H19.5 V12.5 H13 Z M4.5 15.5 H19.5 V20.5 H4.5 Z M12 15.5 V20.5"
            strokeWidth="1.4"
          />
        ) : (
          <path d="M3 5 L9 8 V15 L3 20 M9 8 H21 M9 15 H21 M12 8 V15 M16.5 8 V15" strokeWidth="1.4" />
        )}
      </svg>
      <span className="sr-only lg:not-sr-only">{other === 'wall' ? 'Wall drawing' : 'Room view'}</span>
    </button>
  );
}
