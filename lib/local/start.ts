import path from 'node:path';
import { FROM_A_STACK, origins, plainSurroundings } from './environment';
import { lockedBy, tryLock } from './holders';
import { localFolder } from './places';
import { printFault } from './progress';
import { PREFERRED_PORTS } from './settings';
import { Stack, type RunningStack } from './stack';

function printReady({ settings, real, people }: RunningStack, dev: boolean): void {
  const at = origins(settings);
  console.log(`\nStilewright ${dev ? '(development) ' : ''}is running.\n\n  Address   ${at.web}`);
  if (!real.has('mail')) console.log(`  Mailbox   ${at.mailbox}`);
  if (people.length > 0) console.log(`\nWho can sign in\n${people.join('\n')}`);
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

  const stack = new Stack({
    folder: ['demo'],
    cluster: 'demo',
    database: 'stilewright',
    preferredPorts: PREFERRED_PORTS,
    surroundings: process.env[FROM_A_STACK] ? plainSurroundings(process.env) : process.env,
    dev,
    reset: args.includes('--reset'),
  });
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
    if (stack.hasBegun) console.log('\nStopping ...');
    await stack.stop();
    release();
  }
}

void main().then((code) => process.exit(code));
