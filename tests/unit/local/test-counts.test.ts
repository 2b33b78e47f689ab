import { describe, expect, it } from 'vitest';
import { countPlaywright, countsOf, countVitest } from '@/lib/local/test-counts';

// Shapes of vitest 4's and Playwright 1.65's JSON reports, as those programs wrote them.
const vitestReport = (changes: object) => ({
  numPassedTests: 3,
  numFailedTests: 0,
  numPendingTests: 0,
  numTodoTests: 0,
  testResults: [{ status: 'passed', assertionResults: [{ status: 'passed' }] }],
  ...changes,
});
const playwrightReport = (stats: object, errors: unknown[] = []) => ({
  stats: { expected: 4, skipped: 0, unexpected: 0, flaky: 0, ...stats },
  errors,
});

describe('what is not a pass is a failure', () => {
  it('counts passes as passes', () => {
    expect(countVitest(vitestReport({}))).toEqual({ passed: 3, failed: 0 });
    expect(countPlaywright(playwrightReport({}))).toEqual({ passed: 4, failed: 0 });
  });

  it('counts a skipped test as failed', () => {
    expect(countVitest(vitestReport({ numPendingTests: 1, numTodoTests: 1 })).failed).toBe(2);
    expect(countPlaywright(playwrightReport({ skipped: 1 })).failed).toBe(1);
  });

  it('counts a test that passed at the second try as failed', () => {
    expect(countPlaywright(playwrightReport({ flaky: 1 })).failed).toBe(1);
  });

  it('counts a file that could not be loaded as failed', () => {
    const testResults = [{ status: 'failed', assertionResults: [] }];
    expect(countVitest(vitestReport({ testResults })).failed).toBe(1);
    expect(countPlaywright(playwrightReport({}, [{ message: 'no such module' }])).failed).toBe(1);
  });

  it('fails when there is no report, when nothing ran, and when the runner ended badly without a failed test', () => {
    const unreadable = () => {
      throw new Error('no such file');
    };
    expect(countsOf(unreadable, true)).toEqual({ passed: 0, failed: 1 });
    expect(countsOf(() => ({ passed: 0, failed: 0 }), true)).toEqual({ passed: 0, failed: 1 });
    expect(countsOf(() => ({ passed: 5, failed: 0 }), false)).toEqual({ passed: 5, failed: 1 });
    expect(countsOf(() => ({ passed: 5, failed: 2 }), false)).toEqual({ passed: 5, failed: 2 });
  });
});
