import { z } from 'zod';

export const PAGE_KINDS = ['agreement', 'changeOrder', 'cancellation', 'measureRevision'] as const;
export type PageKind = (typeof PAGE_KINDS)[number];

export const sha256Shape = z.string().regex(/^[0-9a-f]{64}$/, 'is not a SHA-256 in lower-case hex');

/** How somebody signed. */
export const meansShape = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('typed'), text: z.string().trim().min(3).max(120) }),
  z.object({ kind: z.literal('drawn'), svgPath: z.string().min(10).max(20_000) }),
]);
export type Means = z.infer<typeof meansShape>;

/** One signature inside an envelope: who, under which offer, by what consent and means, when. */
export const pageSignatureShape = z.object({
  personId: z.uuid(),
  name: z.string(),
  role: z.enum(['homeowner', 'contractor']),
  offerSha256: sha256Shape,
  consentSha256: sha256Shape,
  means: meansShape,
  signedAt: z.iso.datetime(),
});
export type PageSignature = z.infer<typeof pageSignatureShape>;

/** A sealed page (R2); its canonical JSON is hashed, and that hash is the seal. */
export const pageEnvelopeShape = z.strictObject({
  version: z.literal(1),
  job: z.uuid(),
  sequence: z.number().int().positive(),
  kind: z.enum(PAGE_KINDS),
  previousSha256: sha256Shape.nullable(),
  offerSha256: sha256Shape,
  signatures: z.array(pageSignatureShape).min(1),
  sealedAt: z.iso.datetime(),
});
export type PageEnvelope = z.infer<typeof pageEnvelopeShape>;

/** What a list of pages shows of one. */
export interface PageSummary {
  readonly sequence: number;
  readonly kind: PageKind;
  readonly sha256: string;
  readonly previousSha256: string | null;
  /** In the company's time zone, in words. */
  readonly sealedOn: string;
  readonly sumAfterCents: number;
  readonly thisPageCents: number;
  readonly signedBy: readonly string[];
}

/** A job book as a file: the very texts that were hashed, so that anyone can hash them again. */
export const bookFileShape = z.strictObject({
  format: z.literal('job-book'),
  version: z.literal(1),
  company: z.string(),
  job: z.uuid(),
  jobName: z.string(),
  pages: z.array(
    z.strictObject({
      sequence: z.number().int().positive(),
      sha256: sha256Shape,
      envelope: z.string(),
      offer: z.string(),
    }),
  ),
});
export type BookFile = z.infer<typeof bookFileShape>;

export const pageReferenceShape = z.object({
  jobId: z.uuid(),
  sequence: z.number().int().positive().max(10_000),
});
