import { formatLength } from './length';
import { optionsOf } from './choices';
import type { Edition } from './edition-types';
import type { FrontKind, Takeoff } from './types';

/** One line of the door order, as the supplier reads it. */
export interface DoorOrderRow {
  readonly mark: string;
  readonly kind: FrontKind;
  /** Inches with a fraction. */
  readonly width: string;
  readonly height: string;
  readonly style: string;
  readonly build: 'fivePiece' | 'slab';
  readonly wood: string;
  readonly finish: string;
  readonly hinge: 'left' | 'right' | 'none';
  readonly hinges: number;
  readonly glass: boolean;
}

/** The fronts of a takeoff in the order of their marks, with names for ids (A1). */
export function doorOrder(takeoff: Takeoff, edition: Edition): DoorOrderRow[] {
  const name = (key: 'style' | 'species' | 'finish', id: string): string =>
    optionsOf(edition, key).find((option) => option.id === id)?.name ?? id;
  return [...takeoff.fronts]
    .sort((a, b) => (a.mark < b.mark ? -1 : a.mark > b.mark ? 1 : 0))
    .map((front) => ({
      mark: front.mark,
      kind: front.kind,
      width: formatLength(front.width),
      height: formatLength(front.height),
      style: name('style', front.style),
      build: front.build,
      wood: name('species', front.species),
      finish: name('finish', front.finish),
      hinge: front.hinge,
      hinges: front.hinges,
      glass: front.glass,
    }));
}
