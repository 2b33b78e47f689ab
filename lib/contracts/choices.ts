import { z } from 'zod';
import { CHOICE_KEYS, ZONES, type ChoiceChange, type Choices } from '@/lib/engine/types';

const optionId = z.string().min(1).max(80);
const partMark = z.string().min(1).max(40);
const choiceKey = z.enum(CHOICE_KEYS);

export const choiceChangeShape: z.ZodType<ChoiceChange> = z.union([
  z.strictObject({ key: choiceKey, zone: z.enum(['kitchen', ...ZONES]), option: optionId }),
  z.strictObject({ inside: partMark, option: optionId.nullable() }),
]);

/** A whole set of choices. */
export const choicesShape: z.ZodType<Choices> = z.strictObject({
  version: z.literal(1),
  kitchen: z.record(choiceKey, optionId),
  zones: z.partialRecord(z.enum(ZONES), z.partialRecord(choiceKey, optionId)),
  inside: z.record(partMark, optionId),
});
