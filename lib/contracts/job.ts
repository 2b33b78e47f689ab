import { z } from 'zod';
import { JOB_STAGES } from './states';

export const jobReferenceShape = z.object({ jobId: z.uuid() });

export const jobInputShape = z.object({
  name: z.string().trim().min(1, 'A job needs a name.').max(80),
  address: z.string().trim().min(1, 'A job needs an address.').max(200),
  /** Whoever asks, unless somebody else of the staff is named. */
  salespersonId: z.uuid().optional(),
});

export const jobViewShape = z.object({
  id: z.uuid(),
  /** Counts within the company. */
  number: z.number().int().positive(),
  name: z.string(),
  address: z.string(),
  stage: z.enum(JOB_STAGES),
  salesperson: z.object({ id: z.uuid(), name: z.string(), email: z.string() }),
  surveyId: z.uuid().nullable(),
  editionId: z.uuid().nullable(),
  firstEstimateCents: z.number().int().nullable(),
});
export type JobView = z.infer<typeof jobViewShape>;

/** What a job is recognised by in a list. */
export const ownJobShape = jobViewShape.pick({
  id: true,
  number: true,
  name: true,
  address: true,
  stage: true,
});
export type OwnJob = z.infer<typeof ownJobShape>;

export const stageMoveShape = z.object({ jobId: z.uuid(), to: z.enum(JOB_STAGES) });
