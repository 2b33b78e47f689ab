'use client';

import { useState, type ReactNode } from 'react';
import type { Edition } from '@/lib/engine/edition-types';
import type { Elevation } from './elevation';
import { WallDrawing, type PickPart } from './wall-drawing';

type View = 'room' | 'wall';

/** The station from which all of the room is seen. */
const WHOLE = 'room';

/** The picture of the kitchen: room view or drawn wall, the scheme's tools above, what was found about it beneath. */
export function RoomPanel({
  walls,
  edition,
  wall,
  words,
  room,
  tools,
  foot,
  onWall,
  onPart,
}: {
  walls: readonly Elevation[];
  edition: Edition;
  wall: string;
  /** The picture in words. */
  words: readonly string[];
  /** The room in three dimensions from a station: a wall's id, or `room` for all of it. */
  room: (station: string, otherwise: ReactNode) => ReactNode;
  onWall: (wall: string) => void;
  onPart: PickPart;
  tools: ReactNode;
  foot: ReactNode;
}) {
  const [view, setView] = useState<View>('room');
  // The whole room is shown until somebody turns to a wall, here or on the strip.
  const [whole, setWhole] = useState<{ readonly of: string } | null>({ of: wall });
  const station = view === 'room' && whole?.of === wall ? WHOLE : wall;
  const shown = walls.find((one) => one.wall.id === wall) ?? walls[0];

  function turn(by: -1 | 1) {
    const stations =
      view === 'room' ? [WHOLE, ...walls.map((one) => one.wall.id)] : walls.map((one) => one.wall.id);
    const next = stations[(stations.indexOf(station) + by + stations.length) % stations.length];
    if (next === undefined) return;
    setWhole(next === WHOLE ? { of: wall } : null);
    if (next !== WHOLE) onWall(next);
  }

  const drawing = shown && (
    <WallDrawing
      elevation={shown}
      edition={edition}
      material
      inked={null}
      onPart={onPart}
      className="absolute inset-0 size-full p-2 md:p-4"
    />
  );

  return (
    <section
      aria-label="Your kitchen"
      className="grid min-w-0 grid-rows-[auto_minmax(11rem,1fr)_auto] overflow-hidden rounded-frame border border-hairline bg-panel"
    >
      <div className="flex min-w-0 items-center gap-x-1 border-b border-hairline px-1 md:gap-x-3 md:px-4">
        {tools}
        <ViewSwitch view={view} onView={setView} />
      </div>
      <figure className="relative min-w-0">
        {view === 'room' ? <div className="absolute inset-0">{room(station, drawing)}</div> : drawing}
        <figcaption className="sr-only">{words.join(' ')}</figcaption>
        {walls.length > 0 && (
          <div className="pointer-events-none absolute inset-x-1 top-1/2 flex -translate-y-1/2 justify-between">
            <TurnButton by={-1} onTurn={turn} />
            <TurnButton by={1} onTurn={turn} />
          </div>
        )}
      </figure>
      <div className="max-h-80 overflow-y-auto">{foot}</div>
    </section>
  );
}

function TurnButton({ by, onTurn }: { by: -1 | 1; onTurn: (by: -1 | 1) => void }) {
  return (
    <button
      type="button"
      aria-label={by < 0 ? 'Turn to the left' : 'Turn to the right'}
      onClick={() => onTurn(by)}
      className="pointer-events-auto grid size-11 place-items-center rounded-frame text-quiet hover:text-ink"
    >
      <svg viewBox="0 0 20 32" className="h-8 w-5" aria-hidden="true" fill="none" stroke="currentColor">
        <path d={by < 0 ? 'M15 3 L5 16 L15 29' : 'M5 3 L15 16 L5 29'} strokeWidth="2" />
      </svg>
    </button>
  );
}

function ViewSwitch({ view, onView }: { view: View; onView: (view: View) => void }) {
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
      <span className="sr-only lg:not-sr-only">{other === 'wall' ? 'Wall view' : 'Room view'}</span>
    </button>
  );
}
