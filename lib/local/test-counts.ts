import { z } from 'zod';

/** A test that was skipped did not pass, so it counts as failed. */
export interface Counts {
  readonly passed: number;
  readonly failed: number;
}

const vitestReport = z.object({
  numPassedTests: z.number(),
  numFailedTests: z.number(),
  numPendingTests: z.number(),
  numTodoTests: z.number(),
  testResults: z.array(
    z.object({ status: z.string(), assertionResults: z.array(z.object({ status: z.string() })) }),
  ),
});

const playwrightReport = z.object({
  stats: z.object({ expected: z.number(), skipped: z.number(), unexpected: z.number(), flaky: z.number() }),
  errors: z.array(z.unknown()),
});

/** A file that could not even be loaded has no tests to count; it counts as one. */
export function countVitest(report: unknown): Counts {
  const parsed = vitestReport.parse(report);
  const unloadable = parsed.testResults.filter(
    (file) => file.status === 'failed' && file.assertionResults.length === 0,
  );
  return {
    passed: parsed.numPassedTests,
    failed: parsed.numFailedTests + parsed.numPendingTests + parsed.numTodoTests + unloadable.length,
  };
}

export function countPlaywright(report: unknown): Counts {
  const { stats, errors } = playwrightReport.parse(report);
  return { passed: stats.expected, failed: stats.unexpected + stats.flaky + stats.skipped + errors.length };
}

/** Counts of a part from its report and how its runner ended. Nothing run, or a bad end without a failed test, is one failure. */
export function countsOf(read: () => Counts, endedWell: boolean): Counts {
  let counts: Counts;
  try {
    counts = read();
  } catch {
    return { passed: 0, failed: 1 };
  }
  const nothingRan = counts.passed + counts.failed === 0;
  return nothingRan || (!endedWell && counts.failed === 0)
    ? { ...counts, failed: counts.failed + 1 }
    : counts;
}
