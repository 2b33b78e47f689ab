import { z } from 'zod';
import { choiceChangeShape, choicesShape } from '@/lib/contracts/scheme';
import type { Edit } from './scheme-edit';
import type { Stored } from './scheme-sync';

const keptShape = z.object({
  base: z.object({
    choices: choicesShape,
    decided: z.array(z.string()),
    unsure: z.array(z.string()),
    version: z.number().int(),
    totalCents: z.number().int(),
  }),
  edits: z.array(
    z.object({
      id: z.string(),
      label: z.string(),
      changes: z.array(choiceChangeShape),
      marks: z.array(z.object({ key: z.string(), as: z.enum(['decided', 'unsure', 'open']) })),
    }),
  ),
});

const place = (schemeId: string): string => `stilewright.edits.${schemeId}`;

/** Edits that a page left behind, with the scheme they were made on; null when there are none. */
export function keptEdits(schemeId: string): { base: Stored; edits: readonly Edit[] } | null {
  try {
    const text = localStorage.getItem(place(schemeId));
    if (text === null) return null;
    const parsed = keptShape.safeParse(JSON.parse(text));
    return parsed.success && parsed.data.edits.length > 0 ? parsed.data : null;
  } catch {
    // A browser that keeps nothing still lets one choose.
    return null;
  }
}

export function keepEdits(schemeId: string, base: Stored, edits: readonly Edit[]): void {
  try {
    localStorage.setItem(place(schemeId), JSON.stringify({ base, edits }));
  } catch {
    // As above.
  }
}

export function forgetEdits(schemeId: string): void {
  try {
    localStorage.removeItem(place(schemeId));
  } catch {
    // As above.
  }
}
