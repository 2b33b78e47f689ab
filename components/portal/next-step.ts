import type { DrawView } from '@/lib/contracts/payment';
import type { JobStage } from '@/lib/contracts/states';

export interface NextStep {
  readonly title: string;
  readonly sentence: string;
  /** Where it is done; `null` when the household has only to wait. */
  readonly goes: 'choose' | 'review' | 'pay' | 'changes' | null;
  readonly action: string | null;
}

export interface Standing {
  readonly stage: JobStage;
  /** Decisions taken in the household's newest scheme, and how many there are; null before a proposal. */
  readonly decided: { readonly taken: number; readonly of: number } | null;
  /** The first payment that is due. */
  readonly due: Pick<DrawView, 'number' | 'of'> | null;
  /** A change order waits for the household's signature. */
  readonly changeToSign: boolean;
  /** First name of whom to ask. */
  readonly salesperson: string;
}

const wait = (title: string, sentence: string): NextStep => ({ title, sentence, goes: null, action: null });

/** What a household has to do next, in one sentence; the most pressing thing only. */
export function nextStep({ stage, decided, due, changeToSign, salesperson }: Standing): NextStep {
  if (changeToSign) {
    return {
      title: 'A change order waits for you',
      sentence: 'Read what it changes and what it does to the price, then sign it or leave it.',
      goes: 'changes',
      action: 'Read the change order',
    };
  }
  if (due) {
    return {
      title: `Payment ${due.number} of ${due.of} is due`,
      sentence: 'By card or bank debit; a receipt comes by mail.',
      goes: 'pay',
      action: 'See the payment',
    };
  }
  switch (stage) {
    case 'measured':
      return wait(
        'Your kitchen is measured',
        `${salesperson} is preparing a first proposal. A mail tells you when it is ready.`,
      );
    case 'choosing': {
      if (!decided) {
        return wait(
          'A proposal is on its way',
          `${salesperson} is preparing it. A mail tells you when it is ready.`,
        );
      }
      if (decided.taken >= decided.of) {
        return {
          title: 'Everything is decided',
          sentence:
            'Read the agreement in full, with every line of the price, and sign when you are content.',
          goes: 'review',
          action: 'Review and sign',
        };
      }
      return {
        title: decided.taken === 0 ? 'Choose your kitchen' : 'Go on choosing',
        sentence: `${decided.taken} of ${decided.of} decided. You start from what ${salesperson} proposes, and see at each choice what it does to the price.`,
        goes: 'choose',
        action: decided.taken === 0 ? 'Begin' : 'Go on choosing',
      };
    }
    case 'signed':
      return wait(
        'Signed',
        'Next come the final measure and the samples. Nothing is ordered before your right to cancel has ended.',
      );
    case 'released':
      return wait('Your doors are being made', 'The shop builds from the sealed pages of your job book.');
    case 'materialsIn':
      return wait('Everything has arrived', `${salesperson} will agree the days of installation with you.`);
    case 'installing':
      return wait('The crew is at work', `Call ${salesperson} with anything you notice.`);
    case 'walkThrough':
      return wait('The walk-through', 'Look at every door together; what is not right goes on the list.');
    case 'closed':
      return wait('All done', 'Your job book stays here, complete, to read and to keep.');
  }
}
