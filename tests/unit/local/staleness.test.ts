import { mkdirSync, mkdtempSync, rmSync, utimesSync, writeFileSync } from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { hashFiles, hashSources } from '@/lib/local/staleness';

let folder = '';

const write = (file: string, text: string) => {
  mkdirSync(path.dirname(path.join(folder, file)), { recursive: true });
  writeFileSync(path.join(folder, file), text);
};

beforeEach(() => {
  folder = mkdtempSync(path.join(os.tmpdir(), 'stilewright-sources-'));
  write('app/page.tsx', 'one');
  write('lib/engine/price.ts', 'two');
  write('lib/local/stack.ts', 'three');
});

afterEach(() => rmSync(folder, { recursive: true, force: true }));

describe('a build is stale', () => {
  it('when the text of a source changed', () => {
    const before = hashSources(folder);
    write('app/page.tsx', 'eno');
    expect(hashSources(folder)).not.toBe(before);
  });

  it('when a source was added, renamed or removed', () => {
    const before = hashSources(folder);
    write('app/new.tsx', '');
    const added = hashSources(folder);
    expect(added).not.toBe(before);
    rmSync(path.join(folder, 'app/new.tsx'));
    expect(hashSources(folder)).toBe(before);
    rmSync(path.join(folder, 'app/page.tsx'));
    write('app/paper.tsx', 'one');
    expect(hashSources(folder)).not.toBe(before);
  });

  it('when text moved from one file to the next', () => {
    write('app/a.ts', 'xy');
    write('app/b.ts', 'z');
    const before = hashSources(folder);
    write('app/a.ts', 'x');
    write('app/b.ts', 'yz');
    expect(hashSources(folder)).not.toBe(before);
  });
});

describe('a build is not stale', () => {
  it('when a file was only touched', () => {
    const before = hashSources(folder);
    utimesSync(path.join(folder, 'app/page.tsx'), new Date(0), new Date(0));
    expect(hashSources(folder)).toBe(before);
  });

  it('when what changed is not part of it', () => {
    const before = hashSources(folder);
    write('lib/local/stack.ts', 'four');
    write('tests/unit/some.test.ts', 'five');
    expect(hashSources(folder)).toBe(before);
  });
});

describe('the state of the migrations', () => {
  it('differs when a migration changed', () => {
    write('db/migrations/0000_tables.sql', 'create table one ()');
    const before = hashFiles(folder, ['db/migrations']);
    write('db/migrations/0000_tables.sql', 'create table two ()');
    expect(hashFiles(folder, ['db/migrations'])).not.toBe(before);
  });
});
