import { chmodSync, mkdirSync, renameSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';

/** The project's folder. */
export const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '..', '..');

/**
 * `.local/<parts>`, made when missing. Everything that one machine remembers lies below `.local`. The folders
 * may be entered by others, since PostgreSQL runs under its own account; secret files are 0600.
 */
export function localFolder(...parts: string[]): string {
  let folder = path.join(root, '.local');
  for (const part of ['', ...parts]) {
    folder = path.join(folder, part);
    if (mkdirSync(folder, { recursive: true }) !== undefined) chmodSync(folder, 0o755);
  }
  return folder;
}

/** Writes a file that only its owner may read, whole or not at all. */
export function writePrivately(file: string, text: string): void {
  const fresh = `${file}.${process.pid}.new`;
  writeFileSync(fresh, text, { mode: 0o600 });
  renameSync(fresh, file);
}
