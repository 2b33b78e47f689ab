import { spawn } from 'node:child_process';
import { cpSync, existsSync, mkdirSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { localFolder, root } from './places';
import { hashFiles } from './staleness';

interface Outcome {
  readonly passed: boolean;
  readonly output: string;
}

function run(command: string, args: string[]): Promise<Outcome> {
  return new Promise((resolve) => {
    const child = spawn(process.execPath, [path.join(root, 'node_modules', command), ...args], {
      cwd: root,
      stdio: ['ignore', 'pipe', 'pipe'],
    });
    let output = '';
    child.stdout.on('data', (bytes: Buffer) => (output += bytes.toString()));
    child.stderr.on('data', (bytes: Buffer) => (output += bytes.toString()));
    child.once('error', (error) => resolve({ passed: false, output: error.message }));
    child.once('exit', (code) => resolve({ passed: code === 0, output }));
  });
}

const filesIn = (folder: string) =>
  new Map(
    readdirSync(folder, { recursive: true, encoding: 'utf8' })
      .filter((name) => /\.(sql|json)$/.test(name))
      .map((name) => [name, readFileSync(path.join(folder, name), 'utf8')]),
  );

/** Lets the generator write the next migration into a copy: when it has something to write, the schema drifted. */
async function schemaDrift(cache: string): Promise<Outcome> {
  const committed = path.join(root, 'db', 'migrations');
  if (!existsSync(path.join(committed, 'meta', '_journal.json')))
    return { passed: false, output: 'There are no migrations yet.' };
  const copy = path.join(cache, 'migrations');
  rmSync(copy, { recursive: true, force: true });
  cpSync(committed, copy, { recursive: true });
  const before = filesIn(copy);
  const configFile = path.join(cache, 'drizzle.config.ts');
  const place = path.relative(root, copy);
  writeFileSync(
    configFile,
    `import config from '../../drizzle.config';\nexport default { ...config, out: ${JSON.stringify(`./${place}`)} };\n`,
  );
  const outcome = await run('drizzle-kit/bin.cjs', [
    'generate',
    '--name',
    'drift',
    '--config',
    path.relative(root, configFile),
  ]);
  const added = [...filesIn(copy)].filter(
    ([name, text]) => name.endsWith('.sql') && before.get(name) !== text,
  );
  if (!outcome.passed || added.length === 0) return outcome;
  const statements = added.map(([, text]) => text).join('\n');
  return {
    passed: false,
    output: `The schema says more than the migrations. npm run generate would add:\n${statements}`,
  };
}

/** The types of style sheets and routes are written by the framework; a fresh clone has none yet. */
async function types(): Promise<Outcome> {
  if (!existsSync(path.join(root, 'next-env.d.ts'))) {
    const written = await run('next/dist/bin/next', ['typegen']);
    if (!written.passed) return written;
  }
  return run('typescript/bin/tsc', ['--noEmit', '-p', '.']);
}

async function main(): Promise<boolean> {
  const cache = localFolder('check');
  mkdirSync(cache, { recursive: true });
  // ESLint keeps what it found under rules of our own that have changed since.
  const rules = hashFiles(root, ['lib/local/lint', 'eslint.config.mjs']).slice(0, 12);
  const checks: [string, () => Promise<Outcome>][] = [
    ['Types', types],
    [
      'Lint',
      () =>
        run('eslint/bin/eslint.js', [
          '.',
          '--max-warnings',
          '0',
          '--cache',
          '--cache-strategy',
          'content',
          '--cache-location',
          `${cache}/eslint-${rules}`,
        ]),
    ],
    [
      'Format',
      () =>
        run('prettier/bin/prettier.cjs', [
          '.',
          '--check',
          '--log-level',
          'warn',
          '--cache',
          '--cache-strategy',
          'content',
          '--cache-location',
          `${cache}/prettier`,
        ]),
    ],
    ['Schema', () => schemaDrift(cache)],
  ];
  const results = await Promise.all(
    checks.map(async ([name, check]) => {
      const started = Date.now();
      const { passed, output } = await check();
      console.log(
        `  ${name}: ${passed ? 'in order' : 'faults'}  ${((Date.now() - started) / 1000).toFixed(1)} s`,
      );
      return { name, passed, output };
    }),
  );
  const failed = results.filter((result) => !result.passed);
  for (const { name, output } of failed) console.log(`\n${name}\n${output.trim()}`);
  return failed.length === 0;
}

void main().then((passed) => process.exit(passed ? 0 : 1));
