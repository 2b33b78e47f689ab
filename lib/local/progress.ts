/** Something a person can act on went wrong while setting up; `detail` may quote a log. */
export class SetupFault extends Error {
  constructor(
    sentence: string,
    readonly detail = '',
  ) {
    super(sentence);
    this.name = 'SetupFault';
  }
}

const seconds = (since: number) => `${((Date.now() - since) / 1000).toFixed(1)} s`;

/**
 * Runs one step of the set-up and prints one line for it: its name, what `work` answered and the time taken.
 * On a terminal the line stands there while the step runs.
 */
export async function step<T extends { note?: string } | string | void>(
  title: string,
  work: () => Promise<T>,
): Promise<T> {
  const started = Date.now();
  if (process.stdout.isTTY) process.stdout.write(`  ${title} ...`);
  const clear = () => (process.stdout.isTTY ? process.stdout.write('\r\x1b[K') : undefined);
  try {
    const result = await work();
    const note = typeof result === 'string' ? result : (result?.note ?? 'ready');
    clear();
    console.log(`  ${title}: ${note}  ${seconds(started)}`);
    return result;
  } catch (error) {
    clear();
    console.log(`  ${title}: failed  ${seconds(started)}`);
    throw error;
  }
}

/** Prints what went wrong: one sentence, then the quoted detail when there is one. */
export function printFault(error: unknown): void {
  if (error instanceof SetupFault) {
    console.error(`\n${error.message}`);
    if (error.detail) console.error(error.detail.trimEnd().replace(/^/gm, '    '));
    return;
  }
  console.error('\nThe set-up met an unexpected error:', error);
}
