import { z } from 'zod';
import { companyBrandShape } from './brand';

/** Days for which the link in an invitation is good. */
export const INVITATION_DAYS = 14;

/** Mail addresses are compared in lower case. */
export const emailShape = z
  .string()
  .trim()
  .toLowerCase()
  .pipe(z.email('This is not a mail address.').max(254));

export const invitationInputShape = z.object({
  jobId: z.uuid(),
  email: emailShape,
  name: z.string().trim().min(1, 'Whom shall the mail greet?').max(120),
  /** Whether their signature is required on every page of the book. */
  signer: z.boolean().default(true),
});

export const INVITATION_STATES = ['open', 'accepted', 'expired', 'revoked'] as const;
export type InvitationState = (typeof INVITATION_STATES)[number];

/** An invitation as the staff sees it; the link itself is only in the mail. */
export const invitationViewShape = z.object({
  id: z.uuid(),
  jobId: z.uuid(),
  email: z.string(),
  name: z.string(),
  signer: z.boolean(),
  state: z.enum(INVITATION_STATES),
  sentAt: z.iso.datetime(),
  expiresAt: z.iso.datetime(),
});
export type InvitationView = z.infer<typeof invitationViewShape>;

export const invitationRevocationShape = z.object({ invitationId: z.uuid() });

/** 32 bytes in base64url. */
export const tokenShape = z.string().regex(/^[A-Za-z0-9_-]{43}$/);

/** What somebody who holds the link may know before signing in. */
export const openInvitationShape = z.object({
  company: companyBrandShape,
  state: z.enum(INVITATION_STATES),
  jobId: z.uuid(),
  jobName: z.string(),
  email: z.string(),
  name: z.string(),
  invitedBy: z.string(),
  expiresAt: z.iso.datetime(),
});
export type OpenInvitation = z.infer<typeof openInvitationShape>;

export const acceptanceShape = z.object({ jobId: z.uuid(), company: z.string() });
export type Acceptance = z.infer<typeof acceptanceShape>;
