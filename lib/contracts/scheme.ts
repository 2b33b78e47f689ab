import { z } from 'zod';
import type { Edition, Terms } from '@/lib/engine/edition-types';
import type { Choices, Survey } from '@/lib/engine/types';
import type { CompanyBrand } from './brand';
import type { Role } from './actor';
import { choiceChangeShape, choicesShape } from './choices';
import type { OwnJob } from './job';
import { jobReferenceShape } from './job';

export { choiceChangeShape, choicesShape };

export const SCHEME_LETTERS = ['A', 'B', 'C', 'D', 'E', 'F'] as const;
export type SchemeLetter = (typeof SCHEME_LETTERS)[number];

/** Keys that somebody decided, or left to the salesperson. */
const keysShape = z.array(z.string().min(1).max(80)).max(64);

export const schemeViewShape = z.object({
  id: z.uuid(),
  jobId: z.uuid(),
  letter: z.enum(SCHEME_LETTERS),
  name: z.string(),
  choices: choicesShape,
  decided: z.array(z.string()),
  unsure: z.array(z.string()),
  /** Counts changes; the next change names it. */
  version: z.number().int().positive(),
  totalCents: z.number().int(),
  /** The contractor's own proposal. */
  proposed: z.boolean(),
  updatedAt: z.iso.datetime(),
});
export type SchemeView = z.infer<typeof schemeViewShape>;

export const schemeReferenceShape = z.object({ jobId: z.uuid(), schemeId: z.uuid() });

const nameShape = z.string().trim().min(1, 'A scheme needs a name.').max(60);

export const schemeInputShape = z.object({
  jobId: z.uuid(),
  name: nameShape,
  choices: choicesShape,
  decided: keysShape.default([]),
});

export const schemeCopyShape = schemeReferenceShape.extend({ name: nameShape.optional() });

/** Changes made on one version of a scheme, and the total (in cents) that the asking screen shows for them. */
export const schemeChangeShape = schemeReferenceShape.extend({
  version: z.number().int().positive(),
  changes: z.array(choiceChangeShape).max(40),
  decided: keysShape.optional(),
  unsure: keysShape.optional(),
  totalCents: z.number().int(),
});
export type SchemeChange = z.infer<typeof schemeChangeShape>;

/** Data of a refused change: the scheme as it stands, and what the server computes where the totals differ. */
export const schemeConflictShape = schemeViewShape.extend({ computedCents: z.number().int().optional() });
export type SchemeConflict = z.infer<typeof schemeConflictShape>;

/** What a sealed page's body says of the choices. */
export const sealedChoicesShape = z.object({ choices: choicesShape });

export const kitchenInputShape = jobReferenceShape;

/** All that the choosing screen reads, at once. */
export interface KitchenView {
  readonly job: OwnJob;
  readonly company: CompanyBrand;
  readonly role: Role;
  readonly surveyId: string;
  readonly survey: Survey;
  readonly editionId: string;
  /** Without costs. */
  readonly edition: Edition;
  readonly terms: Terms;
  /** In the order of their letters. */
  readonly schemes: readonly SchemeView[];
  /** What the price tape hangs from: the first estimate, and the contract sum once there is one. */
  readonly baselineCents: number | null;
  readonly salesperson: { readonly name: string; readonly email: string };
  /** The newest sealed page that says what is agreed; null before the first. */
  readonly sealed: {
    readonly sequence: number;
    readonly kind: 'agreement' | 'changeOrder';
    readonly choices: Choices;
  } | null;
}
