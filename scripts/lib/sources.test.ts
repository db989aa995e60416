import { mkdirSync, mkdtempSync, rmSync, utimesSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, relative } from 'node:path';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { root } from './paths.mjs';
import { contentHash } from './sources.mjs';

let folder = '';
const write = (name: string, text: string): void => writeFileSync(join(folder, name), text);
const hash = (): string => contentHash([relative(root, folder)]);

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'sources-'));
  write('a.ts', 'export const a = 1;');
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

test('a build is stale when a source is changed, added, renamed or gone', () => {
  const seen = [hash()];
  write('a.ts', 'export const a = 2;');
  seen.push(hash());
  write('b.ts', 'export const a = 2;');
  seen.push(hash());
  rmSync(join(folder, 'a.ts'));
  seen.push(hash());
  expect(new Set(seen).size).toBe(seen.length);
});

test('dates, tests and what a build itself writes make no build stale', () => {
  const before = hash();
  utimesSync(join(folder, 'a.ts'), 0, 0);
  write('a.test.ts', '');
  mkdirSync(join(folder, 'dist'));
  write('dist/main.js', '');
  expect(hash()).toBe(before);
});
