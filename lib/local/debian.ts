import { spawn } from 'node:child_process';
import { closeSync, existsSync, openSync } from 'node:fs';
import path from 'node:path';
import { localFolder } from './places';
import { tailOf } from './processes';
import { SetupFault } from './progress';

function aptGet(args: string[], logFile: string): Promise<boolean> {
  const log = openSync(logFile, 'a', 0o600);
  const child = spawn(
    'apt-get',
    ['-qq', '-y', '-o', 'Dpkg::Options::=--force-confold', '-o', 'DPkg::Lock::Timeout=300', ...args],
    {
      stdio: ['ignore', log, log],
      env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
    },
  );
  closeSync(log);
  return new Promise((resolve) => {
    child.once('error', () => resolve(false));
    child.once('exit', (code) => resolve(code === 0));
  });
}

/**
 * Installs one of Debian's packages. Needs the rights of root; without them the fault names the command that
 * somebody who has them can run.
 */
export async function installDebianPackage(name: string): Promise<void> {
  if (!existsSync('/usr/bin/apt-get')) {
    throw new SetupFault(`${name} is not installed, and this machine has no apt-get to install it with.`);
  }
  if (process.getuid?.() !== 0) {
    throw new SetupFault(
      `${name} is not installed. Run this, then start again:`,
      `sudo apt-get install -y --no-install-recommends ${name}`,
    );
  }
  const logFile = path.join(localFolder('logs'), 'apt.log');
  await aptGet(['update'], logFile);
  if (!(await aptGet(['install', '--no-install-recommends', name], logFile))) {
    throw new SetupFault(`${name} could not be installed with apt-get.`, tailOf(logFile, 8));
  }
}
