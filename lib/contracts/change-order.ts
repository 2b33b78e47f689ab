import { z } from 'zod';
import type { OfferView } from './offer';
import type { ChangeOrderState, JobStage } from './states';

export const changeOrderInputShape = z.object({
  jobId: z.uuid(),
  /** The scheme whose choices are wanted instead of the signed ones. */
  schemeId: z.uuid(),
  reason: z.string().trim().min(3, 'Say in a few words what you would like instead.').max(500),
});

export const changeOrderReferenceShape = z.object({ jobId: z.uuid(), orderId: z.uuid() });

export const decisionInputShape = changeOrderReferenceShape
  .extend({ decision: z.enum(['approve', 'decline']), reason: z.string().trim().max(500).default('') })
  .refine((input) => input.decision === 'approve' || input.reason.length >= 3, {
    path: ['reason'],
    message: 'A decline needs a reason; the household reads it.',
  });

/** One change order in a list. */
export interface ChangeOrderRow {
  readonly id: string;
  readonly number: number;
  readonly state: ChangeOrderState;
  readonly startedBy: 'homeowner' | 'contractor';
  readonly reason: string;
  readonly amountCents: number;
  readonly decisionReason: string | null;
}

export interface ChangeOrderView extends ChangeOrderRow {
  readonly offer: OfferView;
}

/** A signed change order that waits for the owner. */
export interface ApprovalRow {
  readonly id: string;
  readonly jobId: string;
  readonly jobName: string;
  readonly number: number;
  readonly stage: JobStage;
  readonly amountCents: number;
  readonly sumBeforeCents: number;
  readonly reason: string;
  readonly scope: readonly string[];
  readonly askedBy: string;
  readonly ageHours: number;
  readonly margin: { readonly beforeCents: number; readonly afterCents: number } | null;
}

export const CHANGE_ORDER_STATE_NAMES: Readonly<Record<ChangeOrderState, string>> = {
  draft: 'Draft',
  offered: 'Waits for the household’s signatures',
  signed: 'Signed, waits for the contractor',
  approved: 'Approved and sealed',
  declined: 'Declined',
  withdrawn: 'Withdrawn',
};
