// Plain Node without dependencies: it runs before anything is installed.
import { spawnSync } from 'node:child_process';
import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';

/**
 * Whether node_modules holds exactly what package-lock.json asks for. npm keeps what it installed in
 * `node_modules/.package-lock.json`; an optional package of another platform may be absent there.
 * @param {string} root project folder
 */
export function packagesAreCurrent(root) {
  const installedFile = path.join(root, 'node_modules', '.package-lock.json');
  if (!existsSync(installedFile)) return false;
  const wanted = JSON.parse(readFileSync(path.join(root, 'package-lock.json'), 'utf8')).packages;
  const installed = JSON.parse(readFileSync(installedFile, 'utf8')).packages;
  for (const [place, entry] of Object.entries(wanted)) {
    if (place === '') continue;
    const found = installed[place];
    if (!found && entry.optional) continue;
    if (found?.version !== entry.version || found?.integrity !== entry.integrity) return false;
  }
  return true;
}

/**
 * Installs the locked packages when they are missing or differ. Prints one line when it did something.
 * @param {string} root project folder
 * @returns {boolean} false when the installation failed; the reason has then been printed
 */
export function ensurePackages(root) {
  const major = Number(process.versions.node.split('.')[0]);
  if (major < 20) {
    console.error(`Node 20 or newer is needed; this is Node ${process.versions.node}.`);
    return false;
  }
  if (packagesAreCurrent(root)) return true;
  const started = Date.now();
  if (process.stdout.isTTY) process.stdout.write('  Packages: npm ci ...');
  const run = spawnSync(
    'npm',
    ['ci', '--include=dev', '--ignore-scripts', '--no-audit', '--no-fund', '--loglevel=error'],
    {
      cwd: root,
      stdio: ['ignore', 'pipe', 'pipe'],
      encoding: 'utf8',
      env: { ...process.env, NODE_ENV: '' },
    },
  );
  if (process.stdout.isTTY) process.stdout.write('\r\x1b[K');
  if (run.status !== 0) {
    const reason = run.error ? run.error.message : run.stderr.trim();
    console.error(`The packages could not be installed with npm ci.\n${reason}`);
    return false;
  }
  console.log(`  Packages: installed  ${((Date.now() - started) / 1000).toFixed(1)} s`);
  return true;
}
