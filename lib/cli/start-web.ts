import { spawn } from 'node:child_process';
import path from 'node:path';
import { EnvironmentError, parseEnvironment } from '@/lib/contracts/environment';

/**
 * `npm run start:web`: checks the environment, then serves the production build. Nothing stands in for a service
 * here; a missing variable ends it with a list. `HOST` and `PORT` say where to listen (localhost, 3000).
 */
function main(): void {
  try {
    parseEnvironment({ ...process.env, NODE_ENV: 'production' });
  } catch (error) {
    if (!(error instanceof EnvironmentError)) throw error;
    console.error(error.message);
    process.exit(1);
  }
  const next = path.join('node_modules', 'next', 'dist', 'bin', 'next');
  const place = ['-H', process.env.HOST || 'localhost', '-p', process.env.PORT || '3000'];
  const web = spawn(process.execPath, [next, 'start', ...place], {
    stdio: 'inherit',
    env: { ...process.env, NODE_ENV: 'production' },
  });
  for (const signal of ['SIGINT', 'SIGTERM'] as const) process.on(signal, () => web.kill(signal));
  web.once('error', (error) => {
    console.error(`The web server could not be started: ${error.message}`);
    process.exit(1);
  });
  web.once('exit', (code) => process.exit(code ?? 0));
}

main();
