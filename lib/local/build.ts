import { existsSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { BUILD_VARIABLES, plainSurroundings } from './environment';
import { hold, holdersOf, lock } from './holders';
import { localFolder, root } from './places';
import type { ProcessKeeper } from './processes';
import { hashSources } from './staleness';

/** Two places, so that a stack can go on serving one build while a newer one is made beside it. */
const PLACES = ['.next', '.next-b'] as const;

const stampFile = (place: string) => path.join(root, place, 'stilewright-sources');
const holdersFolder = (place: string) => path.join(localFolder('builds'), place.replace('.', ''));

function stampOf(place: string): string | null {
  try {
    return readFileSync(stampFile(place), 'utf8');
  } catch {
    return null;
  }
}

export interface Build {
  /** The folder for `NEXT_DIST_DIR`. */
  readonly place: string;
  readonly note: string;
}

/**
 * A production build of the present sources: one that exists when nothing changed, else a new one. This process
 * holds it until it ends, so that no other builds over it.
 */
export async function ensureBuild(keeper: ProcessKeeper): Promise<Build> {
  const release = await lock(
    path.join(localFolder('builds'), 'lock'),
    600_000,
    'Another process is still building.',
  );
  try {
    const sources = hashSources(root);
    const current = PLACES.find(
      (place) => stampOf(place) === sources && existsSync(path.join(root, place, 'BUILD_ID')),
    );
    if (current) {
      hold(holdersFolder(current));
      return { place: current, note: 'nothing changed' };
    }
    const place = PLACES.find((candidate) => holdersOf(holdersFolder(candidate)).length === 0) ?? PLACES[0];
    rmSync(stampFile(place), { force: true });
    await keeper.run(
      'build',
      process.execPath,
      ['node_modules/next/dist/bin/next', 'build'],
      { ...plainSurroundings(process.env), ...BUILD_VARIABLES, NEXT_DIST_DIR: place, NODE_ENV: 'production' },
      'The production build failed.',
    );
    writeFileSync(stampFile(place), sources);
    hold(holdersFolder(place));
    return { place, note: 'built' };
  } finally {
    release();
  }
}
