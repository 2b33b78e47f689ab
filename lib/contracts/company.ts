import { z } from 'zod';

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
