import { existsSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import path from 'node:path';
import { installDebianPackage } from './debian';
import { plainSurroundings } from './environment';
import { lockedBy, tryLock } from './holders';
import { localFolder, root } from './places';
import { ensurePostgres } from './postgres';
import { ProcessKeeper, type Variables } from './processes';
import { printFault, step } from './progress';
import { Stack } from './stack';
import { countPlaywright, countsOf, countVitest, type Counts } from './test-counts';

const PARTS = ['unit', 'db', 'e2e'] as const;
type Part = (typeof PARTS)[number];

/** One run of the tests: its own folder, database, ports and processes. */
class TestRun {
  private readonly place = ['test', 'runs', `${process.pid}`] as const;
  private readonly folder = localFolder(...this.place);
  private readonly release = tryLock(path.join(this.folder, 'run.lock'));
  private readonly keeper = new ProcessKeeper(path.join(this.folder, 'runners.json'), this.folder);
  private readonly database = `e2e_${process.pid}`;
  private stack: Stack | null = null;
  private stopped: Promise<void> | null = null;

  constructor(private readonly filters: string[]) {}

  /** Removes what earlier runs left that were killed or that failed: processes, databases, folders. */
  async sweep(): Promise<void> {
    const runs = localFolder('test', 'runs');
    const dead = readdirSync(runs).filter((name) => !lockedBy(path.join(runs, name, 'run.lock')));
    if (dead.length === 0) return;
    for (const name of dead) {
      for (const record of ['runners.json', 'processes.json']) {
        await new ProcessKeeper(path.join(runs, name, record), path.join(runs, name)).endLeftovers();
      }
    }
    const cluster = await ensurePostgres({ name: 'test' });
    try {
      for (const name of dead) await cluster.dropDatabase(`e2e_${name}`);
    } finally {
      await cluster.stop();
    }
    for (const name of dead) rmSync(path.join(runs, name), { recursive: true, force: true });
  }

  async run(part: Part): Promise<Counts> {
    return part === 'e2e' ? this.browserTests() : this.vitest(part);
  }

  private async vitest(part: 'unit' | 'db'): Promise<Counts> {
    const results = path.join(this.folder, `${part}.json`);
    const args = [
      'run',
      '--project',
      part,
      '--reporter=default',
      '--reporter=json',
      `--outputFile.json=${results}`,
      ...this.filters,
    ];
    const endedWell = await this.runner(part, 'vitest/vitest.mjs', args, {
      NODE_ENV: 'test',
      VITE_CONFIG_NATIVE_IGNORE_WARNING: 'true',
    });
    return countsOf(() => countVitest(JSON.parse(readFileSync(results, 'utf8'))), endedWell);
  }

  private async browserTests(): Promise<Counts> {
    await step('Chromium', async () => {
      if (existsSync('/usr/bin/chromium')) return 'present';
      await installDebianPackage('chromium');
      return 'installed';
    });
    // Apart from other runs of the tests, which may be choosing at the same moment.
    const first = 4400 + (process.pid % 50) * 20;
    this.stack = new Stack({
      folder: this.place,
      cluster: 'test',
      database: this.database,
      preferredPorts: {
        web: first,
        clerk: first + 1,
        stripe: first + 2,
        mailbox: first + 3,
        smtp: first + 4,
      },
      // No test ever reaches a real service, whatever the surroundings name.
      surroundings: plainSurroundings(process.env),
      dev: false,
      reset: true,
    });
    const { variables } = await this.stack.start();
    const results = path.join(this.folder, 'e2e.json');
    const endedWell = await this.runner('e2e', '@playwright/test/cli.js', ['test', ...this.filters], {
      ...variables,
      NODE_ENV: 'test',
      PLAYWRIGHT_RESULTS: results,
      PLAYWRIGHT_SKIP_BROWSER_DOWNLOAD: '1',
    });
    return countsOf(() => countPlaywright(JSON.parse(readFileSync(results, 'utf8'))), endedWell);
  }

  private async runner(part: Part, program: string, args: string[], variables: Variables): Promise<boolean> {
    const env = { ...plainSurroundings(process.env), ...variables };
    const file = path.join(root, 'node_modules', program);
    const child = this.keeper.start(part, process.execPath, [file, ...args], env, { terminal: true });
    return (await child.ended) === 'ended with code 0';
  }

  /** Ends everything; the folder with the logs stays until the next run when `keepLogs` is set. */
  stop(keepLogs: boolean): Promise<void> {
    this.stopped ??= (async () => {
      await this.keeper.stop();
      await this.stack?.stop(true);
      this.release?.();
      if (!keepLogs) rmSync(this.folder, { recursive: true, force: true });
      else console.log(`Logs: ${path.relative(root, this.folder)}`);
    })();
    return this.stopped;
  }
}

async function runParts(parts: readonly Part[], run: TestRun): Promise<Counts> {
  const total = { passed: 0, failed: 0 };
  await run.sweep();
  for (const part of parts) {
    const started = Date.now();
    console.log(`\n== ${{ unit: 'Unit tests', db: 'Database tests', e2e: 'Browser tests' }[part]}`);
    let counts: Counts = { passed: 0, failed: 1 };
    try {
      counts = await run.run(part);
    } catch (error) {
      printFault(error);
    }
    total.passed += counts.passed;
    total.failed += counts.failed;
    console.log(
      `== ${counts.passed} passed, ${counts.failed} failed in ${((Date.now() - started) / 1000).toFixed(0)} s`,
    );
  }
  return total;
}

async function main(): Promise<number> {
  const [first, ...rest] = process.argv.slice(2);
  const named = PARTS.find((part) => part === first);
  if (first && !named) {
    console.error(`Unknown part ${first}. Known are ${PARTS.join(', ')}; a filter may follow.`);
    return 1;
  }
  const run = new TestRun(rest);
  const interrupted = new Promise<'interrupted'>((resolve) => {
    for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP', 'disconnect'] as const)
      process.on(signal, () => resolve('interrupted'));
  });
  const outcome = await Promise.race([interrupted, runParts(named ? [named] : PARTS, run)]);
  if (outcome === 'interrupted') {
    await run.stop(false);
    console.log('Interrupted.');
    return 130;
  }
  await run.stop(outcome.failed > 0);
  console.log(`${outcome.passed} passed, ${outcome.failed} failed`);
  return outcome.failed > 0 ? 1 : 0;
}

void main().then((code) => process.exit(code));
