import { z } from 'zod';

/** What a visitor who is not signed in may know of a contractor. */
export const companyBrandShape = z.object({
  id: z.uuid(),
  slug: z.string(),
  name: z.string(),
  phone: z.string(),
  licence: z.string().nullable(),
  timeZone: z.string(),
  /** Two-letter state code. */
  state: z.string().length(2),
  brand: z.object({
    /** `#rrggbb` on the light ground, and its partner on the dark one. */
    light: z.string().regex(/^#[0-9a-f]{6}$/i),
    dark: z.string().regex(/^#[0-9a-f]{6}$/i),
    /** Inline SVG of the mark, drawn in `currentColor`, checked when stored. */
    markSvg: z.string().nullable(),
  }),
});
export type CompanyBrand = z.infer<typeof companyBrandShape>;
