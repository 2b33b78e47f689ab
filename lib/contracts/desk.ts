import type { ChangeOrderState, JobStage } from './states';

/** One line of the desk's list of jobs. */
export interface DeskJobRow {
  readonly id: string;
  readonly number: number;
  readonly name: string;
  readonly address: string;
  readonly stage: JobStage;
  readonly salesperson: string;
  /** What somebody has to do next, as a sentence. */
  readonly nextStep: string;
  /** The sum that is signed, or the newest estimate when nothing is. */
  readonly sumCents: number | null;
  readonly signed: boolean;
  readonly paidCents: number;
}

/** The sentence that says what a job waits for. */
export function nextStepOf(job: {
  readonly stage: JobStage;
  readonly openInvitations: number;
  readonly guests: number;
  readonly signaturesMissing: number | null;
  readonly drawDue: boolean;
  readonly orders: readonly ChangeOrderState[];
}): string {
  if (job.orders.includes('signed')) return 'A signed change order waits for the owner.';
  if (job.orders.includes('offered')) return 'A change order waits for the household to sign.';
  switch (job.stage) {
    case 'measured':
      return 'Propose a scheme and invite the household.';
    case 'choosing':
      if (job.guests === 0 && job.openInvitations === 0) return 'Invite the household.';
      if (job.guests === 0) return 'The household has not opened its invitation yet.';
      if (job.signaturesMissing !== null && job.signaturesMissing > 0)
        return job.signaturesMissing === 1
          ? 'One signature is missing.'
          : `${job.signaturesMissing} signatures are missing.`;
      return 'The household is choosing.';
    case 'signed':
      return job.drawDue ? 'The deposit is due.' : 'Final measure, samples, then release to the shop.';
    case 'released':
      return 'The shop builds from the sealed pages.';
    case 'materialsIn':
      return 'Set the installation dates.';
    case 'installing':
      return 'Installing.';
    case 'walkThrough':
      return 'Walk through the list with the household.';
    case 'closed':
      return 'Nothing is open.';
  }
}
