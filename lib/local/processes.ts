import { spawn, type ChildProcess } from 'node:child_process';
import {
  closeSync,
  existsSync,
  openSync,
  readdirSync,
  readFileSync,
  readlinkSync,
  realpathSync,
  renameSync,
  statSync,
} from 'node:fs';
import { setTimeout as wait } from 'node:timers/promises';
import { z } from 'zod';
import { root, writePrivately } from './places';
import { SetupFault } from './progress';

/** A process that cannot be confused with a later one of the same number. */
export const identityShape = z.object({ pid: z.number().int(), startedAt: z.number(), boot: z.string() });
export type Identity = z.infer<typeof identityShape>;

interface ProcessFacts {
  readonly pid: number;
  readonly group: number;
  readonly startedAt: number;
  readonly state: string;
}

/** This start of the machine; process numbers and start times begin anew with the next. */
const boot = readFileSync('/proc/sys/kernel/random/boot_id', 'utf8').trim();

function factsOf(pid: number): ProcessFacts | null {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
    // The name stands in brackets and may itself contain spaces and brackets. See proc(5).
    const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
    return { pid, state: fields[0] ?? '', group: Number(fields[2]), startedAt: Number(fields[19]) };
  } catch {
    return null;
  }
}

export function identityOf(pid: number): Identity | null {
  const facts = factsOf(pid);
  return facts && facts.state !== 'Z' ? { pid, startedAt: facts.startedAt, boot } : null;
}

export const ownIdentity = (): Identity =>
  identityOf(process.pid) ?? { pid: process.pid, startedAt: 0, boot };

/** Whether that very process still runs. */
export function lives(identity: Identity): boolean {
  return identity.boot === boot && identityOf(identity.pid)?.startedAt === identity.startedAt;
}

/** The numbers of all processes whose working folder is `folder`, as far as this account may look. */
export function processesWorkingIn(folder: string): number[] {
  const real = realpathSync(folder);
  return readdirSync('/proc')
    .filter((name) => /^\d+$/.test(name))
    .map(Number)
    .filter((pid) => {
      try {
        return readlinkSync(`/proc/${pid}/cwd`) === real;
      } catch {
        return false;
      }
    });
}

/** Members of a process group that were started from this project's folder, no earlier than its leader. */
function membersOf(leader: Identity): number[] {
  if (leader.boot !== boot) return [];
  return processesWorkingIn(root).filter((pid) => {
    const facts = factsOf(pid);
    if (!facts || facts.state === 'Z' || facts.group !== leader.pid) return false;
    if (facts.pid === leader.pid) return facts.startedAt === leader.startedAt;
    return facts.startedAt >= leader.startedAt;
  });
}

/** Ends a whole process group that we started: politely, then after `patience` ms at once. */
async function endGroup(leader: Identity, patience: number): Promise<void> {
  const send = (signal: NodeJS.Signals) => {
    for (const pid of membersOf(leader)) {
      try {
        process.kill(pid, signal);
      } catch {
        // It ended in the meantime.
      }
    }
  };
  send('SIGTERM');
  const deadline = Date.now() + patience;
  while (membersOf(leader).length > 0 && Date.now() < deadline) await wait(50);
  send('SIGKILL');
}

const MAX_LOG_BYTES = 5_000_000;

export type Variables = Record<string, string | undefined>;

/** Children always know their mode; what is not said to be production or a test is development. */
const withMode = (env: Variables): NodeJS.ProcessEnv => ({
  ...env,
  NODE_ENV: env.NODE_ENV === 'production' || env.NODE_ENV === 'test' ? env.NODE_ENV : 'development',
});

const recordShape = z.array(identityShape.extend({ name: z.string() }));

export interface Child {
  readonly name: string;
  readonly process: ChildProcess;
  /** Settles when it ends, with what to tell about it. */
  readonly ended: Promise<string>;
  /** The newest lines it wrote. */
  tail(lines?: number): string;
}

/** The last lines of a log file from byte `from` on. */
export function tailOf(file: string, lines = 25, from = 0): string {
  try {
    return readFileSync(file).subarray(from).toString('utf8').trimEnd().split('\n').slice(-lines).join('\n');
  } catch {
    return '';
  }
}

/**
 * The processes of one stack. Each runs in its own process group and is written down with its start time, so
 * that the next start can end what a killed one left behind, and nothing else.
 */
export class ProcessKeeper {
  private readonly children: { child: Child; identity: Identity }[] = [];
  private stopping = false;

  constructor(
    private readonly recordFile: string,
    private readonly logFolder: string,
  ) {}

  /** Ends what an earlier, killed run of this stack left running. Answers how many process groups that were. */
  async endLeftovers(): Promise<number> {
    let record: z.infer<typeof recordShape> = [];
    try {
      record = recordShape.parse(JSON.parse(readFileSync(this.recordFile, 'utf8')));
    } catch {
      return 0;
    }
    const left = record.filter((entry) => membersOf(entry).length > 0);
    await Promise.all(left.map((entry) => endGroup(entry, 3000)));
    this.write();
    return left.length;
  }

  /** Starts a program; what it prints goes to `<name>.log`, also to our output with `echo`, only there with `terminal`. */
  start(
    name: string,
    command: string,
    args: string[],
    env: Variables,
    { echo = false, terminal = false }: { echo?: boolean; terminal?: boolean } = {},
  ): Child {
    if (this.stopping) throw new SetupFault('Stopped before everything had started.');
    const logFile = `${this.logFolder}/${name}.log`;
    // Logs grow over many starts; one older piece is kept.
    if (existsSync(logFile) && statSync(logFile).size > MAX_LOG_BYTES) renameSync(logFile, `${logFile}.old`);
    const log = openSync(logFile, 'a', 0o600);
    const from = statSync(logFile).size;
    const child = spawn(command, args, {
      cwd: root,
      env: withMode(env),
      detached: true,
      stdio: terminal ? ['ignore', 'inherit', 'inherit'] : ['ignore', log, log],
    });
    closeSync(log);
    const ended = new Promise<string>((resolve) => {
      child.once('error', (error) => resolve(`could not be run: ${error.message}`));
      child.once('exit', (code, signal) =>
        resolve(signal ? `was ended by ${signal}` : `ended with code ${code}`),
      );
    });
    const entry: Child = { name, process: child, ended, tail: (lines) => tailOf(logFile, lines, from) };
    const identity = child.pid === undefined ? null : identityOf(child.pid);
    if (identity) {
      this.children.push({ child: entry, identity });
      this.write();
    }
    if (echo) this.follow(logFile, from, name);
    return entry;
  }

  /** Runs a program to its end. Throws `SetupFault` with `sentence` and the end of its log when it fails. */
  async run(
    name: string,
    command: string,
    args: string[],
    env: Variables,
    sentence: string,
  ): Promise<string> {
    const child = this.start(name, command, args, env);
    const outcome = await child.ended;
    if (outcome !== 'ended with code 0') throw new SetupFault(`${sentence} It ${outcome}.`, child.tail());
    return child.tail(200);
  }

  /** Ends everything started here, newest first, each group before the next. */
  async stop(patience = 8000): Promise<void> {
    this.stopping = true;
    for (const { identity } of this.children.reverse()) await endGroup(identity, patience);
    this.children.length = 0;
    this.write();
  }

  private write(): void {
    const record = this.children.map(({ child, identity }) => ({ name: child.name, ...identity }));
    writePrivately(this.recordFile, JSON.stringify(record, null, 2));
  }

  private follow(file: string, from: number, name: string): void {
    let seen = from;
    const timer = setInterval(() => {
      const bytes = readFileSync(file).subarray(seen);
      const end = bytes.lastIndexOf(10) + 1;
      if (end === 0) return;
      seen += end;
      process.stdout.write(
        bytes
          .subarray(0, end)
          .toString('utf8')
          .replace(/^(?=.)/gm, `[${name}] `),
      );
    }, 300);
    timer.unref();
  }
}
