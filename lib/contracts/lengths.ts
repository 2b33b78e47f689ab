import { z } from 'zod';
import { LENGTH_SENTENCE, parseLength } from '@/lib/engine/length';
import type { CalendarDate, Cents, Sixtyfourths } from '@/lib/engine/types';

/** The names under which a survey or an edition holds lengths; `members` is a list of them. */
const LENGTH_NAMES = new Set(
  [
    'x y width widthSecond height at bottom depth thickness stileLeft stileRight railTop railBottom ceiling casing',
    'legA legB outOfPlane overhang lip handle toeDoor stile rail drawerRail panelThickness groove panelPlay',
    'plankWidth smallestPanel smallestDrawerHeight smallestHeight widestLeaf smallestRowGap amount gap setback',
    'overlay intrusion smallestReveal face projection centres smallestWidth smallestDepth space overhang',
    'widestPanel bumper crownClearance nailerLap veneerTrim baseClearance valanceClearance slideRearAllowance',
    'boxHeightClearance kerf boxBack boxThickness pullOutHeight endAllowance',
  ].flatMap((names) => names.split(' ')),
);

/** Integer 64ths of an inch; a text that could not be read is told with a form that can. */
export const lengthShape = z
  .number({ error: LENGTH_SENTENCE })
  .int('A length is a whole number of 64ths of an inch.')
  .min(-64_000)
  .max(640_000)
  .transform((value) => value as Sixtyfourths);

/** A length that is a size. */
export const sizeShape = z
  .number({ error: LENGTH_SENTENCE })
  .int('A length is a whole number of 64ths of an inch.')
  .min(0, 'A size is not below zero.')
  .max(640_000)
  .transform((value) => value as Sixtyfourths);

/** A size above zero. */
export const positiveShape = z
  .number({ error: LENGTH_SENTENCE })
  .int('A length is a whole number of 64ths of an inch.')
  .min(1, 'This size must be more than zero.')
  .max(640_000)
  .transform((value) => value as Sixtyfourths);

export const centsShape = z
  .number()
  .int('A price is a whole number of cents.')
  .transform((value) => value as Cents);

export const dateShape: z.ZodType<CalendarDate> = z.iso.date('Write a date as 2026-11-02.');

/**
 * A copy of `json` in which typed lengths (`24 1/2`) are integer 64ths (D2). `typed` gets each text by its path,
 * where an element of a list is named by its `id` if it has one.
 */
export function readLengths(json: unknown, typed: Record<string, string>, path = ''): unknown {
  if (Array.isArray(json)) {
    return json.map((one: unknown, index) => {
      const id = typeof one === 'object' && one !== null && 'id' in one ? one.id : undefined;
      return readLengths(one, typed, below(path, typeof id === 'string' ? id : String(index)));
    });
  }
  if (typeof json !== 'object' || json === null) return json;
  const entries = Object.entries(json).map(([name, value]: [string, unknown]) => {
    const here = below(path, name);
    if (path === '' && name === 'typed') return [name, value] as const;
    if (LENGTH_NAMES.has(name) && typeof value === 'string') return [name, read(value, typed, here)] as const;
    if (name === 'members' && Array.isArray(value)) {
      const members = value.map((one: unknown, index) =>
        typeof one === 'string' ? read(one, typed, below(here, String(index))) : one,
      );
      return [name, members] as const;
    }
    return [name, readLengths(value, typed, here)] as const;
  });
  return Object.fromEntries(entries);
}

const below = (path: string, name: string): string => (path === '' ? name : `${path}.${name}`);

function read(text: string, typed: Record<string, string>, path: string): number | string {
  const parsed = parseLength(text);
  if (!parsed.ok) return text;
  typed[path] = parsed.typed;
  return parsed.value;
}
