import { spawn } from 'node:child_process';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { ensurePackages } from './packages.mjs';

const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '..', '..');

/**
 * Makes sure that the packages are there, then runs a TypeScript file of this folder as the same command:
 * same terminal, same arguments, same exit code.
 * @param {string} file name within lib/local
 */
export function handOver(file) {
  if (!ensurePackages(root)) process.exit(1);
  // The channel closes when this process is killed outright, which tells the other to stop too.
  const child = spawn(
    process.execPath,
    ['--import', 'tsx', path.join('lib', 'local', file), ...process.argv.slice(2)],
    {
      cwd: root,
      stdio: ['inherit', 'inherit', 'inherit', 'ipc'],
    },
  );
  // A terminal sends Ctrl-C to both; the other one decides when everything has ended.
  process.on('SIGINT', () => undefined);
  for (const signal of ['SIGTERM', 'SIGHUP']) process.on(signal, () => child.kill(signal));
  child.on('error', (error) => {
    console.error(`${file} could not be run: ${error.message}`);
    process.exit(1);
  });
  child.on('exit', (code) => process.exit(code ?? 1));
}
