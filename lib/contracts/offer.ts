import { z } from 'zod';
import { choicesShape } from './choices';
import { meansShape, sha256Shape } from './page';

const cents = z.number().int();
const zone = z.enum(['kitchen', 'wall', 'base', 'island', 'tall']);
/** Integer 64ths of an inch. */
const length64 = z.number().int();

/** A front as the shop orders it; the door order prints from these and from nothing else. */
export const offerFrontShape = z.strictObject({
  mark: z.string(),
  kind: z.enum(['door', 'drawerFront', 'falseFront', 'appliancePanel']),
  width: length64,
  height: length64,
  style: z.string(),
  build: z.enum(['fivePiece', 'slab']),
  wood: z.string(),
  finish: z.string(),
  hinge: z.enum(['left', 'right', 'none']),
  hinges: z.number().int(),
  glass: z.boolean(),
});
export type OfferFront = z.infer<typeof offerFrontShape>;

export const offerLineShape = z.strictObject({
  code: z.string(),
  label: z.string(),
  zone,
  quantity: z.number().int(),
  quantityText: z.string(),
  unitPriceCents: cents,
  amountCents: cents,
  parts: z.array(z.string()),
  because: z.string(),
});

export const DUE_STAGES = ['signing', 'released', 'materialsIn', 'installing', 'walkThrough'] as const;

const sentences = z.array(z.string());

/**
 * What a signer is shown (R1): facts alone, without times of signing, signatures or links. Its canonical JSON is
 * stored and hashed, and never rebuilt. All sums in cents.
 */
export const offerBodyShape = z.strictObject({
  version: z.literal(1),
  kind: z.enum(['agreement', 'changeOrder']),
  company: z.strictObject({ name: z.string(), phone: z.string(), licence: z.string().nullable() }),
  job: z.strictObject({ id: z.uuid(), number: z.number().int(), name: z.string(), address: z.string() }),
  survey: z.strictObject({ sha256: sha256Shape }),
  edition: z.strictObject({ number: z.number().int(), title: z.string(), sha256: sha256Shape }),
  /** The change order's number and the page it changes; null on an agreement. */
  order: z
    .strictObject({ number: z.number().int().positive(), basedOn: z.number().int().positive() })
    .nullable(),
  reason: z.string().nullable(),
  scope: sentences,
  choices: choicesShape,
  choicesNamed: z.array(z.strictObject({ zone, label: z.string(), option: z.string() })),
  fronts: z.array(offerFrontShape),
  parts: sentences,
  lines: z.array(offerLineShape),
  subtotalCents: cents,
  discountCents: cents,
  taxCents: cents,
  totalCents: cents,
  /** Contract arithmetic (M7). */
  sum: z.strictObject({
    originalCents: cents,
    previousOrdersCents: cents,
    beforeCents: cents,
    thisPageCents: cents,
    afterCents: cents,
  }),
  schedule: z.array(
    z.strictObject({
      number: z.number().int().positive(),
      label: z.string(),
      due: z.enum(DUE_STAGES),
      dueText: z.string(),
      amountCents: cents,
    }),
  ),
  fitNotes: z.array(z.strictObject({ code: z.string(), parts: z.array(z.string()), text: z.string() })),
  stays: sentences,
  responsibilities: z.array(z.strictObject({ title: z.string(), text: z.string() })),
  place: z.strictObject({ sale: z.string(), language: z.string() }),
  /** The calendar date where the company is, from which the dates in the notices are computed. */
  preparedOn: z.iso.date(),
  dates: sentences,
  notices: z.array(
    z.strictObject({
      code: z.string(),
      title: z.string(),
      text: z.string(),
      source: z.string(),
      sha256: sha256Shape,
    }),
  ),
  consent: z.strictObject({ title: z.string(), paragraphs: sentences, sha256: sha256Shape }),
  requiredSigners: z.array(
    z.strictObject({ personId: z.uuid(), name: z.string(), role: z.enum(['homeowner', 'contractor']) }),
  ),
});
export type OfferBody = z.infer<typeof offerBodyShape>;

/** One difference between two offers, in words; with what it does to the sum where it does something. */
export interface OfferDifference {
  readonly text: string;
  readonly amountCents?: number;
}

/** An offer as one of its readers sees it. */
export interface OfferView {
  readonly id: string;
  readonly sha256: string;
  readonly body: OfferBody;
  readonly state: 'current' | 'replaced' | 'sealed';
  /** The offer that took its place. */
  readonly replacedBy: string | null;
  /** What moved since the offer that this one took the place of. */
  readonly differences: readonly OfferDifference[];
  readonly signatures: readonly {
    readonly personId: string;
    readonly name: string;
    readonly signedAt: string;
  }[];
  /** Who has still to sign. */
  readonly missing: readonly { readonly personId: string; readonly name: string }[];
  readonly sealedSequence: number | null;
}

export const offerInputShape = z.object({ jobId: z.uuid(), schemeId: z.uuid() });
export const offerReferenceShape = z.object({ jobId: z.uuid(), offerId: z.uuid() });

export const signatureInputShape = offerReferenceShape.extend({
  /** The hash of what the signer was shown. */
  sha256: sha256Shape,
  consent: z.object({ accepted: z.literal(true), sha256: sha256Shape }),
  means: meansShape,
});
