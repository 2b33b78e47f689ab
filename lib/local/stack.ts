import { existsSync, rmSync } from 'node:fs';
import path from 'node:path';
import { ensureBuild } from './build';
import {
  asShell,
  origins,
  plainSurroundings,
  programVariables,
  realServices,
  type Service,
} from './environment';
import type { FakesPlan } from './fakes';
import { lockedBy, tryLock } from './holders';
import { localFolder, root, writePrivately } from './places';
import { ensurePostgres, type Cluster } from './postgres';
import { ProcessKeeper, type Child, type Variables } from './processes';
import { printFault, SetupFault, step } from './progress';
import { loadSettings, type Settings } from './settings';

const TSX = ['--import', 'tsx'];
const TSX_WATCH = ['node_modules/tsx/dist/cli.mjs', 'watch', '--clear-screen=false'];
const NEXT = 'node_modules/next/dist/bin/next';

export interface StackOptions {
  /** Whose folder under `.local`, and which PostgreSQL cluster. */
  readonly name: 'demo';
  /** Source changes show at once; nothing is built. */
  readonly dev: boolean;
  /** Forget the demo: its database, and what the fakes remember. */
  readonly reset: boolean;
}

/** Everything that runs on this machine for one address. */
export class Stack {
  private readonly folder: string;
  private readonly keeper: ProcessKeeper;
  private cluster: Promise<Cluster> | null = null;
  private watched: Child[] = [];
  private stopped: Promise<void> | null = null;

  constructor(private readonly options: StackOptions) {
    this.folder = localFolder(options.name);
    this.keeper = new ProcessKeeper(
      path.join(this.folder, 'processes.json'),
      localFolder(options.name, 'logs'),
    );
  }

  /** Starts all of it in order. Throws `SetupFault`; whatever had been started is then still to be stopped. */
  async start(): Promise<{ settings: Settings; real: ReadonlySet<Service> }> {
    const { keeper, options } = this;
    const real = realServices(process.env);
    const leftovers = await keeper.endLeftovers();
    if (leftovers > 0)
      console.log(`  Ended ${leftovers} process group(s) that an earlier run had left behind`);
    const settings = await loadSettings(this.folder);

    let databaseUrl = process.env.DATABASE_URL ?? '';
    let databaseOwnerUrl = process.env.DATABASE_OWNER_URL ?? '';
    if (!real.has('postgres')) {
      const cluster = await step('PostgreSQL', () => (this.cluster = ensurePostgres({ name: options.name })));
      if (options.reset) await cluster.dropDatabase('stilewright');
      await cluster.createDatabase('stilewright');
      databaseUrl = cluster.appUrl('stilewright');
      databaseOwnerUrl = cluster.ownerUrl('stilewright');
    }
    const variables = programVariables(settings, { databaseUrl }, real, process.env);
    const environment = { ...plainSurroundings(process.env), ...variables };
    const ownerEnvironment = { ...environment, DATABASE_OWNER_URL: databaseOwnerUrl };
    writePrivately(
      path.join(this.folder, 'environment.sh'),
      asShell({ ...variables, DATABASE_OWNER_URL: databaseOwnerUrl }),
    );

    await this.script(
      'Migrations',
      'migrate',
      'db/migrate.ts',
      ownerEnvironment,
      'The database could not be migrated.',
    );
    await this.startFakes(settings, real);
    await this.script('Demo', 'seed', 'db/seed/seed.ts', ownerEnvironment, 'The demo could not be put in.');

    const production = { ...environment, NODE_ENV: 'production' };
    const build = options.dev ? null : await step('Build', () => ensureBuild(keeper));
    await this.startWorker(options.dev ? environment : production);
    await step('Web', async () => {
      const place = ['-H', 'localhost', '-p', String(settings.ports.web)];
      const web = build
        ? keeper.start('web', process.execPath, [NEXT, 'start', ...place], {
            ...production,
            NEXT_DIST_DIR: build.place,
          })
        : keeper.start('web', process.execPath, [NEXT, 'dev', ...place], environment, { echo: true });
      this.watched.push(web);
      await untilAnswers(origins(settings).web, web);
      return origins(settings).web;
    });
    return { settings, real };
  }

  /** Settles when a part of the running stack ends on its own, with a sentence about it. */
  async failure(): Promise<SetupFault> {
    return Promise.race(
      this.watched.map(async (child) => {
        const outcome = await child.ended;
        return new SetupFault(
          `The ${child.name} process ${outcome}, so everything is stopped.`,
          child.tail(),
        );
      }),
    );
  }

  /** Ends everything, whatever state the start had reached. */
  stop(): Promise<void> {
    this.stopped ??= (async () => {
      await this.keeper.stop();
      const cluster = await this.cluster?.catch(() => null);
      await cluster?.stop();
    })();
    return this.stopped;
  }

  private async script(
    title: string,
    name: string,
    file: string,
    env: Variables,
    sentence: string,
  ): Promise<void> {
    await step(title, async () => {
      if (!existsSync(path.join(root, file))) return `${file} is not there`;
      const output = await this.keeper.run(name, process.execPath, [...TSX, file], env, sentence);
      return output.split('\n').at(-1) || 'done';
    });
  }

  private async startFakes(settings: Settings, real: ReadonlySet<Service>): Promise<void> {
    const fakes = (['clerk', 'stripe', 'mail'] as const).filter((name) => !real.has(name));
    if (fakes.length === 0) return;
    await step('Fakes', async () => {
      const stateFolder = path.join(this.folder, 'fakes');
      if (this.options.reset) rmSync(stateFolder, { recursive: true, force: true });
      localFolder(this.options.name, 'fakes');
      const plan: FakesPlan = { settings, stateFolder, fakes };
      const planFile = path.join(this.folder, 'fakes.json');
      writePrivately(planFile, JSON.stringify(plan, null, 2));
      const run = this.options.dev ? TSX_WATCH : TSX;
      const env = plainSurroundings(process.env);
      const child = this.keeper.start(
        'fakes',
        process.execPath,
        [...run, 'lib/local/fakes.ts', planFile],
        env,
        {
          echo: this.options.dev,
        },
      );
      this.watched.push(child);
      const ports = fakes.flatMap((name) =>
        name === 'mail' ? [settings.ports.mailbox] : [settings.ports[name]],
      );
      await Promise.all(
        ports
          .filter(
            (port) =>
              port === settings.ports.mailbox ||
              existsSync(
                path.join(root, `lib/local/${port === settings.ports.clerk ? 'clerk' : 'stripe'}/server.ts`),
              ),
          )
          .map((port) => untilAnswers(`http://127.0.0.1:${port}`, child)),
      );
      return fakes.join(', ');
    });
  }

  private async startWorker(env: Variables): Promise<void> {
    if (!existsSync(path.join(root, 'lib/services/worker.ts'))) return;
    const run = this.options.dev ? TSX_WATCH : TSX;
    const worker = this.keeper.start('worker', process.execPath, [...run, 'lib/services/worker.ts'], env, {
      echo: this.options.dev,
    });
    this.watched.push(worker);
  }
}

/** Waits until a server answers anything at all. Throws when its process ends first, or after two minutes. */
export async function untilAnswers(origin: string, child: Child): Promise<void> {
  let outcome: string | null = null;
  void child.ended.then((text) => (outcome = text));
  const deadline = Date.now() + 120_000;
  for (;;) {
    try {
      await fetch(origin, { redirect: 'manual', signal: AbortSignal.timeout(60_000) });
      return;
    } catch {
      if (outcome !== null) throw new SetupFault(`The ${child.name} process ${outcome}.`, child.tail());
      if (Date.now() > deadline) {
        throw new SetupFault(
          `The ${child.name} process did not answer at ${origin} within two minutes.`,
          child.tail(),
        );
      }
      await new Promise((resolve) => setTimeout(resolve, 100));
    }
  }
}

function printReady(
  { settings, real }: { settings: Settings; real: ReadonlySet<Service> },
  dev: boolean,
): void {
  const at = origins(settings);
  console.log(`\nStilewright ${dev ? '(development) ' : ''}is running.\n\n  Address   ${at.web}`);
  if (!real.has('mail')) console.log(`  Mailbox   ${at.mailbox}`);
  console.log('\nCtrl-C stops everything.');
}

async function main(): Promise<number> {
  const args = process.argv.slice(2);
  const unknown = args.filter((arg) => arg !== '--dev' && arg !== '--reset');
  if (unknown.length > 0) {
    console.error(
      `Unknown: ${unknown.join(' ')}. Known are --dev (show source changes at once) and --reset (forget the demo).`,
    );
    return 1;
  }
  const dev = args.includes('--dev');
  const lockFile = path.join(localFolder('demo'), 'stack.lock');
  const release = tryLock(lockFile);
  if (!release) {
    console.error(
      `Stilewright already runs from this folder (process ${lockedBy(lockFile)?.pid ?? 'unknown'}). Stop it first.`,
    );
    return 1;
  }

  const stack = new Stack({ name: 'demo', dev, reset: args.includes('--reset') });
  const interrupted = new Promise<'interrupted'>((resolve) => {
    for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP', 'disconnect'] as const)
      process.on(signal, () => resolve('interrupted'));
  });
  try {
    console.log('Stilewright');
    const started = await Promise.race([interrupted, stack.start()]);
    if (started === 'interrupted') return 0;
    printReady(started, dev);
    const ending = await Promise.race([interrupted, stack.failure()]);
    if (ending === 'interrupted') return 0;
    printFault(ending);
    return 1;
  } catch (error) {
    printFault(error);
    return 1;
  } finally {
    console.log('\nStopping ...');
    await stack.stop();
    release();
  }
}

void main().then((code) => process.exit(code));
