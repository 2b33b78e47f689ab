import { linkSync, mkdirSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import path from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { writePrivately } from './places';
import { identityShape, lives, ownIdentity, type Identity } from './processes';
import { SetupFault } from './progress';

function readIdentity(file: string): Identity | null {
  try {
    return identityShape.parse(JSON.parse(readFileSync(file, 'utf8')));
  } catch {
    return null;
  }
}

/** The processes that hold the thing that `folder` stands for; those that died are forgotten. */
export function holdersOf(folder: string): Identity[] {
  mkdirSync(folder, { recursive: true });
  return readdirSync(folder).flatMap((name) => {
    if (name.endsWith('.new')) return [];
    const holder = readIdentity(path.join(folder, name));
    if (holder && lives(holder)) return [holder];
    rmSync(path.join(folder, name), { force: true });
    return [];
  });
}

/** Notes this process as a holder until the answered function is called or the process ends. */
export function hold(folder: string): () => void {
  mkdirSync(folder, { recursive: true });
  const file = path.join(folder, `${process.pid}-${Math.random().toString(36).slice(2, 8)}`);
  writePrivately(file, JSON.stringify(ownIdentity()));
  return () => rmSync(file, { force: true });
}

/** The living process that has the lock, or null. */
export function lockedBy(file: string): Identity | null {
  const holder = readIdentity(file);
  return holder && lives(holder) ? holder : null;
}

/** Takes a lock, or answers null when a living process has it. The answered function gives it back. */
export function tryLock(file: string): (() => void) | null {
  const own = `${file}.${process.pid}.${Math.random().toString(36).slice(2, 8)}`;
  writePrivately(own, JSON.stringify(ownIdentity()));
  try {
    // A link appears whole or not at all, so a lock file is never seen half-written.
    for (let attempt = 0; attempt < 2; attempt += 1) {
      try {
        linkSync(own, file);
        return () => {
          if (lockedBy(file)?.pid === process.pid) rmSync(file, { force: true });
        };
      } catch {
        if (lockedBy(file)) return null;
        rmSync(file, { force: true });
      }
    }
    return null;
  } finally {
    rmSync(own, { force: true });
  }
}

/** Takes a lock, waiting up to `patience` ms for another process that has it. */
export async function lock(file: string, patience: number, sentence: string): Promise<() => void> {
  const deadline = Date.now() + patience;
  for (;;) {
    const release = tryLock(file);
    if (release) return release;
    if (Date.now() > deadline)
      throw new SetupFault(`${sentence} (process ${lockedBy(file)?.pid ?? 'unknown'})`);
    await wait(100);
  }
}
