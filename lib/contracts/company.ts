import { z } from 'zod';
import { companyBrandShape } from './brand';

/** How a contractor sells: everything here is the owner's to set. */
export const companySettingsShape = z.object({
  /** Shares of the contract sum in parts per million, first is the deposit; they add up to 1,000,000. */
  drawPlan: z.array(
    z.object({
      label: z.string(),
      share: z.number().int().positive(),
      due: z.enum(['signing', 'released', 'materialsIn', 'installing', 'walkThrough']),
    }),
  ),
  /** Key of the rule set by which deposits and cancellation are computed. */
  ruleSet: z.string(),
  terms: z.unknown(),
  warrantyYears: z.number().int().min(0),
  insurance: z.string(),
  permits: z.string(),
  disconnects: z.string(),
  startWindow: z.string(),
  /** A salesperson's own limit for contractor-started change orders, in cents. */
  salespersonLimitCents: z.number().int().min(0),
});
export type CompanySettings = z.infer<typeof companySettingsShape>;

export const companyInputShape = z.object({
  /** First part of every address of the company. */
  slug: z
    .string()
    .regex(/^[a-z0-9]+(-[a-z0-9]+)*$/)
    .max(60),
  name: z.string().trim().min(1).max(120),
  phone: z.string().trim().min(1).max(40),
  licence: z.string().trim().max(80).nullable(),
  /** IANA name, such as `America/New_York`. */
  timeZone: z.string().refine((zone) => {
    try {
      return new Intl.DateTimeFormat('en-US', { timeZone: zone }) !== null;
    } catch {
      return false;
    }
  }, 'This is no time zone.'),
  state: z.string().regex(/^[A-Z]{2}$/),
  brand: companyBrandShape.shape.brand,
  settings: companySettingsShape,
  clerkOrganizationId: z.string().min(1),
  stripeAccountId: z.string().startsWith('acct_'),
});
export type CompanyInput = z.infer<typeof companyInputShape>;
