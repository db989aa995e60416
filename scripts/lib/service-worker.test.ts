import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { afterAll, expect, it } from 'vitest';
import { keptAhead } from './service-worker.mjs';

const folder = mkdtempSync(join(tmpdir(), 'mereward-worker-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const script = (name: string) => `_expo/static/js/web/${name}-0123456789abcdef0123456789abcdef.js`;
const FILES = [
  'index.html',
  'ground.css',
  'app.webmanifest',
  'icons/icon-192.png',
  'icons/icon-512.png',
  'fonts/source-sans-3-latin.woff2',
  'fonts/OFL.txt',
  'assets/arrow.png',
  ...['entry', '__common', '__expo-metro-runtime', 'cast', '[pegId]', 'draw', 'wide-table', '__part'].map(
    script,
  ),
];
for (const file of FILES) {
  mkdirSync(dirname(join(folder, file)), { recursive: true });
  writeFileSync(join(folder, file), '');
}
const scriptsOf = new Map([
  ['./bank/surveys/[visitId]/cast.tsx', [`/${script('cast')}`, `/${script('__part')}`]],
  ['./water/pegs/[pegId].tsx', [`/${script('[pegId]')}`]],
  ['./office/lakes/new.tsx', [`/${script('draw')}`]],
]);

it('keeps the shell and the bank’s screens with the parts they need, and leaves the office’s for when it is opened', () => {
  expect(keptAhead(folder, scriptsOf)).toEqual(
    [
      'index.html',
      'ground.css',
      'app.webmanifest',
      'icons/icon-192.png',
      'fonts/source-sans-3-latin.woff2',
      ...['entry', '__common', '__expo-metro-runtime', 'cast', '[pegId]', '__part'].map(script),
    ].sort(),
  );
});

it('keeps every script of a client that was left whole, since none can be told apart', () => {
  const kept = keptAhead(folder, new Map());
  expect(kept.filter((file) => file.endsWith('.js'))).toHaveLength(8);
});
