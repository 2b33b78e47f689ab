import { z } from 'zod';
import type { Terms } from '@/lib/engine/edition-types';
import type { Cents } from '@/lib/engine/types';
import type { CompanySettings } from './company';

const ppm = z.number().int().min(0).max(1_000_000);
const cents = z
  .number()
  .int()
  .min(0)
  .transform((value) => value as Cents);

/** A contractor's terms of computation: place, tax, discount. */
export const termsShape: z.ZodType<Terms> = z.object({
  version: z.literal(1),
  tax: z.object({
    mode: z.enum(['onLines', 'onMaterials', 'none']),
    basis: z.enum(['invoice', 'item']),
    rates: z.partialRecord(z.enum(['material', 'labour', 'other']), z.array(ppm)),
    place: z.string(),
    exemption: z.string().optional(),
  }),
  discount: z.discriminatedUnion('kind', [
    z.object({ kind: z.literal('none') }),
    z.object({ kind: z.literal('amount'), cents }),
    z.object({ kind: z.literal('percent'), ppm }),
  ]),
  crewSize: z.number().int().min(1),
});

/** The terms in a company's settings. Throws when they were stored otherwise. */
export const termsOf = (settings: CompanySettings): Terms => termsShape.parse(settings.terms);
