import { z } from 'zod';
import { receiptJobShape } from './payment';

/** A mail to be written in a contractor's brand. Paragraphs of the text are parted by an empty line. */
export const mailJobShape = z.object({
  companyId: z.uuid(),
  to: z.object({ name: z.string(), email: z.email() }),
  subject: z.string().min(1),
  text: z.string().min(1),
  /** The one thing to do, shown as a button and as an address. */
  action: z.object({ label: z.string(), url: z.url() }).optional(),
});
export type MailJob = z.infer<typeof mailJobShape>;

export const pageSealedJobShape = z.object({
  companyId: z.uuid(),
  jobId: z.uuid(),
  sequence: z.number().int().positive(),
});
export type PageSealedJob = z.infer<typeof pageSealedJobShape>;

/** What is done in the background, by queue, and what each job is told. */
export interface JobPayloads {
  mail: MailJob;
  /** Money was posted: its receipt goes out. */
  paymentReceipt: z.infer<typeof receiptJobShape>;
  /** A page was sealed: it is announced to the household and to the staff. */
  pageSealed: PageSealedJob;
}

export type Queue = keyof JobPayloads;
export type JobPayload<Q extends Queue> = JobPayloads[Q];

export const JOB_SHAPES: { readonly [Q in Queue]: z.ZodType<JobPayloads[Q]> } = {
  mail: mailJobShape,
  paymentReceipt: receiptJobShape,
  pageSealed: pageSealedJobShape,
};

export const QUEUES: readonly Queue[] = ['mail', 'paymentReceipt', 'pageSealed'];

/** Where jobs end that failed at every try. */
export const FAILED_QUEUE = 'failed';

/** Tries after the first, and seconds before the second; the wait doubles with each. */
export const RETRY = { limit: 6, delaySeconds: 5 } as const;
