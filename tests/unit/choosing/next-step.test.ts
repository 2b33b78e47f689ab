import { describe, expect, it } from 'vitest';
import { nextStep, type Standing } from '@/components/portal/next-step';
import { JOB_STAGES } from '@/lib/contracts/states';

const standing = (more: Partial<Standing>): Standing => ({
  stage: 'choosing',
  decided: { taken: 4, of: 9 },
  due: null,
  changeToSign: false,
  salesperson: 'Rowan',
  ...more,
});

describe('what a household has to do next', () => {
  it.each(JOB_STAGES)('is said at the stage %s', (stage) => {
    const step = nextStep(standing({ stage }));
    expect(step.title).not.toBe('');
    expect(step.sentence).toMatch(/\.$/);
    expect(step.goes === null).toBe(step.action === null);
  });

  it('is choosing while something is open, and signing once all is decided', () => {
    expect(nextStep(standing({})).goes).toBe('choose');
    expect(nextStep(standing({ decided: { taken: 9, of: 9 } })).goes).toBe('review');
  });

  it('is nothing before there is a proposal', () => {
    expect(nextStep(standing({ decided: null })).goes).toBeNull();
  });

  it('is the payment that is due, and before it the change order that waits', () => {
    const due = { number: 2, of: 4 };
    expect(nextStep(standing({ stage: 'materialsIn', due })).title).toBe('Payment 2 of 4 is due');
    expect(nextStep(standing({ stage: 'released', due, changeToSign: true })).goes).toBe('changes');
  });
});
