'use client';

import { useId } from 'react';
import type { Edition } from '@/lib/engine/edition-types';
import type { Choices, FrameLayout, Opening, Survey } from '@/lib/engine/types';
import { formatLength } from '@/lib/engine/length';

const KINDS: Readonly<Partial<Record<Opening['kind'], string>>> = {
  door: 'door',
  pair: 'pair of doors',
  drawer: 'drawer',
};

function openingsOf(layout: FrameLayout): readonly Opening[] {
  return 'opening' in layout ? [layout.opening] : layout.parts.flatMap(openingsOf);
}

export interface InsidePlace {
  /** `N-03-2`. */
  readonly mark: string;
  readonly words: string;
}

/** Openings that something of the edition's storage can be put into, in plan order. */
export function insidePlaces(survey: Survey, edition: Edition): readonly InsidePlace[] {
  return survey.cabinets
    .filter((cabinet) => cabinet.action !== 'remove')
    .flatMap((cabinet) =>
      openingsOf(cabinet.frame.layout)
        .filter((opening) =>
          edition.storage.some(
            (storage) =>
              storage.kind !== 'none' &&
              storage.openings.some((kind) => kind === opening.kind) &&
              opening.width >= storage.smallestWidth &&
              cabinet.depth >= storage.smallestDepth,
          ),
        )
        .map((opening) => ({
          mark: `${cabinet.id}-${opening.n}`,
          words: `${KINDS[opening.kind] ?? opening.kind}, ${formatLength(opening.width)} wide`,
        })),
    );
}

/** Which opening's inside is at hand; the wall strip leads here too. */
export function InsideBand({
  survey,
  edition,
  choices,
  opening,
  onOpening,
}: {
  survey: Survey;
  edition: Edition;
  choices: Choices;
  opening: string | null;
  onOpening: (mark: string) => void;
}) {
  const id = useId();
  const places = insidePlaces(survey, edition);
  const walls = survey.walls.map((wall) => ({
    wall,
    places: places.filter((place) => place.mark.startsWith(`${wall.id}-`)),
  }));
  return (
    <div className="flex flex-wrap items-center gap-x-3 gap-y-1 border-b border-hairline px-3 py-2 md:px-5">
      <label htmlFor={id}>Opening</label>
      <select
        id={id}
        value={opening ?? ''}
        onChange={(event) => onOpening(event.target.value)}
        className="min-h-target max-w-full rounded-frame border border-ink/45 bg-panel px-3 text-reading"
      >
        {walls
          .filter((one) => one.places.length > 0)
          .map((one) => (
            <optgroup key={one.wall.id} label={one.wall.name}>
              {one.places.map((place) => (
                <option key={place.mark} value={place.mark}>
                  {place.mark}: {place.words}
                  {choices.inside[place.mark] ? ' (added)' : ''}
                </option>
              ))}
            </optgroup>
          ))}
      </select>
      <p className="basis-full text-note text-quiet md:basis-auto">
        Inside, the boxes stay as they are, unless something is added here.
      </p>
    </div>
  );
}
