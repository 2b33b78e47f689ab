import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, statSync } from 'node:fs';
import path from 'node:path';

/** What a production build is made of. */
export const BUILD_SOURCES = [
  'app',
  'components',
  'db',
  'fonts',
  'lib',
  'public',
  'middleware.ts',
  'next.config.ts',
  'package.json',
  'package-lock.json',
  'postcss.config.mjs',
  'tailwind.config.ts',
  'tsconfig.json',
];

/** Parts of the sources above that no page imports. */
const NOT_BUILT = ['lib/local', 'lib/cli', 'db/seed', 'db/migrations'];

function* filesBelow(root: string, place: string, except: readonly string[]): Generator<string> {
  if (except.includes(place)) return;
  const full = path.join(root, place);
  if (!existsSync(full)) return;
  if (!statSync(full).isDirectory()) {
    yield place;
    return;
  }
  for (const name of readdirSync(full).sort()) yield* filesBelow(root, path.posix.join(place, name), except);
}

/** A hash over names and contents of all files at `places` below `root`: the same files, the same hash. */
export function hashFiles(root: string, places: readonly string[], except: readonly string[] = []): string {
  const hash = createHash('sha256');
  for (const place of places) {
    for (const file of filesBelow(root, place, except)) {
      const bytes = readFileSync(path.join(root, file));
      hash.update(`${file}\0${bytes.length}\0`).update(bytes);
    }
  }
  return hash.digest('hex');
}

/** A hash over all that a production build is made of. */
export const hashSources = (root: string): string => hashFiles(root, BUILD_SOURCES, NOT_BUILT);
