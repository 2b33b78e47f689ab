import { existsSync, rmSync } from 'node:fs';
import path from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { ensureBuild } from './build';
import {
  asShell,
  FROM_A_STACK,
  origins,
  plainSurroundings,
  programVariables,
  realServices,
  type Service,
} from './environment';
import type { FakesPlan } from './fakes';
import { localFolder, root, writePrivately } from './places';
import { ensurePostgres, type Cluster, type ClusterName } from './postgres';
import { ProcessKeeper, type Child, type Variables } from './processes';
import { SetupFault, step } from './progress';
import { loadSettings, type Ports, type Settings } from './settings';

const TSX = ['--import', 'tsx'];
const TSX_WATCH = ['node_modules/tsx/dist/cli.mjs', 'watch', '--clear-screen=false'];
const NEXT = 'node_modules/next/dist/bin/next';

export interface StackOptions {
  /** Its folder below `.local`. */
  readonly folder: readonly string[];
  readonly cluster: ClusterName;
  readonly database: string;
  /** Where it listens unless others do. */
  readonly preferredPorts: Ports;
  /** Variables that may name real services in place of what stands in. */
  readonly surroundings: Variables;
  /** Source changes show at once; nothing is built. */
  readonly dev: boolean;
  /** Forget the demo: its database, and what the fakes remember. */
  readonly reset: boolean;
}

export interface RunningStack {
  readonly settings: Settings;
  readonly real: ReadonlySet<Service>;
  /** All that a test or a command run by hand needs to reach it. */
  readonly variables: Record<string, string>;
  /** Who can sign in and how, a line each, as the seed says. */
  readonly people: readonly string[];
}

/** Everything that runs on this machine for one address. */
export class Stack {
  private readonly folder: string;
  private readonly keeper: ProcessKeeper;
  private cluster: Promise<Cluster> | null = null;
  private readonly watched: Child[] = [];
  private stopped: Promise<void> | null = null;

  constructor(private readonly options: StackOptions) {
    this.folder = localFolder(...options.folder);
    this.keeper = new ProcessKeeper(
      path.join(this.folder, 'processes.json'),
      localFolder(...options.folder, 'logs'),
    );
  }

  /** Starts all of it in order. Throws `SetupFault`; whatever had been started is then still to be stopped. */
  async start(): Promise<RunningStack> {
    const { keeper, options } = this;
    const real = realServices(options.surroundings);
    const leftovers = await keeper.endLeftovers();
    if (leftovers > 0)
      console.log(`  Ended ${leftovers} process group(s) that an earlier run had left behind`);
    const settings = await loadSettings(this.folder, options.preferredPorts);

    let databaseUrl = options.surroundings.DATABASE_URL ?? '';
    let databaseOwnerUrl = options.surroundings.DATABASE_OWNER_URL ?? '';
    if (!real.has('postgres')) {
      const cluster = await step(
        'PostgreSQL',
        () => (this.cluster = ensurePostgres({ name: options.cluster })),
      );
      if (options.reset) await cluster.dropDatabase(options.database);
      await cluster.createDatabase(options.database);
      databaseUrl = cluster.appUrl(options.database);
      databaseOwnerUrl = cluster.ownerUrl(options.database);
    }
    const variables = programVariables(settings, { databaseUrl }, real, options.surroundings);
    const environment = { ...plainSurroundings(options.surroundings), ...variables };
    const ownerEnvironment = { ...environment, DATABASE_OWNER_URL: databaseOwnerUrl };
    const reach = {
      [FROM_A_STACK]: '1',
      ...variables,
      DATABASE_OWNER_URL: databaseOwnerUrl,
      MAILBOX_ORIGIN: origins(settings).mailbox,
    };
    writePrivately(path.join(this.folder, 'environment.sh'), asShell(reach));

    await this.script(
      'Migrations',
      'migrate',
      'db/migrate.ts',
      ownerEnvironment,
      'The database could not be migrated.',
    );
    await this.startFakes(settings, real);
    // Where everything is real, invented people have no business.
    const seed =
      options.surroundings.NODE_ENV === 'production'
        ? []
        : await this.script(
            'Demo',
            'seed',
            'db/seed/seed.ts',
            ownerEnvironment,
            'The demo could not be put in.',
          );

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
    return { settings, real, variables: reach, people: seed };
  }

  /** Whether there is anything to stop. */
  get hasBegun(): boolean {
    return this.cluster !== null || this.watched.length > 0;
  }

  /** Settles when a part of the running stack ends on its own, with a sentence about it. */
  async failure(): Promise<SetupFault> {
    const children = this.watched.map(async (child) => {
      const outcome = await child.ended;
      return new SetupFault(`The ${child.name} process ${outcome}, so everything is stopped.`, child.tail());
    });
    return Promise.race([...children, this.databaseFailure()]);
  }

  private async databaseFailure(): Promise<SetupFault> {
    const cluster = await this.cluster;
    // The server is nobody's child here when it was taken over, so it is looked at instead of awaited.
    while (!cluster || cluster.runs()) await wait(2000);
    return new SetupFault('PostgreSQL ended on its own, so everything is stopped.');
  }

  /** Ends everything, whatever state the start had reached; `forget` drops its database too. */
  stop(forget = false): Promise<void> {
    this.stopped ??= (async () => {
      await this.keeper.stop();
      const cluster = await this.cluster?.catch(() => null);
      if (forget) await cluster?.dropDatabase(this.options.database);
      await cluster?.stop();
    })();
    return this.stopped;
  }

  /** Runs one of the program's scripts. Its last line goes to the progress; the lines before it are answered. */
  private async script(
    title: string,
    name: string,
    file: string,
    env: Variables,
    sentence: string,
  ): Promise<string[]> {
    const { lines } = await step(title, async () => {
      if (!existsSync(path.join(root, file))) return { note: `${file} is not there`, lines: [] };
      const output = await this.keeper.run(name, process.execPath, [...TSX, file], env, sentence);
      const written = output.split('\n').filter((line) => line.trim() !== '');
      return { note: written.at(-1)?.trim() ?? 'done', lines: written.slice(0, -1) };
    });
    return lines;
  }

  private async startFakes(settings: Settings, real: ReadonlySet<Service>): Promise<void> {
    const fakes = (['clerk', 'stripe', 'mail'] as const).filter((name) => !real.has(name));
    if (fakes.length === 0) return;
    await step('Fakes', async () => {
      const stateFolder = path.join(this.folder, 'fakes');
      if (this.options.reset) rmSync(stateFolder, { recursive: true, force: true });
      localFolder(...this.options.folder, 'fakes');
      const plan: FakesPlan = { settings, stateFolder, fakes };
      const planFile = path.join(this.folder, 'fakes.json');
      writePrivately(planFile, JSON.stringify(plan, null, 2));
      const run = this.options.dev ? TSX_WATCH : TSX;
      const env = plainSurroundings(this.options.surroundings);
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
      await wait(100);
    }
  }
}
