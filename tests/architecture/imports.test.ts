import { expect, test } from 'vitest';
import { valueCycles } from './cycles';
import { projectFiles, sourceFile, type SourceFile } from './source-file';
import { badNames, longFiles, looseCode, unwantedWords } from './voice';
import { crossedWalls } from './walls';
import { climbs } from './word-order';

const files = projectFiles();
const invented = (path: string, text: string): SourceFile => sourceFile(path, text);

test('the walk finds the sources of every room', () => {
  const rooms = [
    'apps/api/src/',
    'apps/mobile/src/',
    'packages/db/src/',
    'packages/shared/src/',
    'scripts/',
    'tests/',
  ];
  expect(rooms.filter((room) => !files.some((file) => file.path.startsWith(room)))).toEqual([]);
});

test('no import crosses a wall', () => {
  expect(crossedWalls(files)).toEqual([]);
});

test('a crossed wall is found, by type, by value, by call and by relative path', () => {
  const faults = crossedWalls([
    invented('apps/mobile/src/lib/a.ts', "import type { Lake } from '@mereward/db/entities/lakes/lake';"),
    invented(
      'packages/shared/src/lakes/b.ts',
      "import { readFile } from 'node:fs';\nimport { z } from 'zod';",
    ),
    invented('packages/shared/src/lakes/c.ts', "type Pool = import('pg').Pool;"),
    invented('packages/db/src/d.ts', "const load = () => import('@mereward/api/config');"),
    invented('apps/api/src/e.ts', "import { f } from '../../../packages/shared/src/lakes/f';"),
    invented('apps/mobile/src/lib/g.ts', "export { join } from 'node:path';"),
  ]);
  expect(faults.map((fault) => fault.split(' ')[0])).toEqual([
    'apps/mobile/src/lib/a.ts:1',
    'packages/shared/src/lakes/b.ts:1',
    'packages/shared/src/lakes/c.ts:1',
    'packages/db/src/d.ts:1',
    'apps/api/src/e.ts:1',
    'apps/mobile/src/lib/g.ts:1',
  ]);
});

test('words import only downhill and stand in known folders', () => {
  expect(climbs(files)).toEqual([]);
});

test('a climb is found: a word to one above it, a foundation to a word, an unknown folder', () => {
  const faults = climbs([
    invented('apps/api/src/lakes/service.ts', "import { buildChart } from '../charts/service';"),
    invented('apps/api/src/charts/service.ts', "import { loadLake } from '../lakes/service';"),
    invented('apps/api/src/http/session.ts', "import type { Account } from '../accounts/service';"),
    invented('apps/mobile/src/components/list.tsx', "import { PegCard } from '@/features/lakes/peg-card';"),
    invented('packages/shared/src/gossip/rumour.ts', 'export const rumour = 1;'),
  ]);
  expect(faults).toEqual([
    'apps/api/src/lakes/service.ts:1 lakes may not import charts (../charts/service)',
    'apps/api/src/http/session.ts:1 http may not import accounts (../accounts/service)',
    'apps/mobile/src/components/list.tsx:1 components may not import lakes (@/features/lakes/peg-card)',
    'packages/shared/src/gossip/rumour.ts “gossip” is no word or foundation of ours',
  ]);
});

test('no files need one another in a ring at run time', () => {
  expect(valueCycles(files)).toEqual([]);
});

test('a ring of values is found and a ring of types is let be', () => {
  const ring = (typeOnly: string): SourceFile[] => [
    invented('packages/shared/src/a.ts', "import { b } from './b';\nexport const a = b;"),
    invented('packages/shared/src/b.ts', `import ${typeOnly}{ a } from './a';\nexport const b = 1;`),
  ];
  expect(valueCycles(ring(''))).toEqual([
    'packages/shared/src/a.ts → packages/shared/src/b.ts → packages/shared/src/a.ts',
  ]);
  expect(valueCycles(ring('type '))).toEqual([]);
});

test('no file is longer than four hundred lines', () => {
  expect(longFiles(files)).toEqual([]);
  expect(longFiles([invented('apps/api/src/a.ts', 'let a;\n'.repeat(401))])).toEqual([
    'apps/api/src/a.ts has 401 lines; 400 is the most',
  ]);
  expect(longFiles([invented('apps/api/src/a.ts', 'let a;\n'.repeat(400))])).toEqual([]);
});

test('no file switches its checks off, prints by console, leaves work undone or names one machine', () => {
  expect(unwantedWords(files)).toEqual([]);
});

test('each unwanted word is found', () => {
  const lines = [
    `// @ts-${'ignore'}`,
    `// eslint-${'disable'}-next-line`,
    `console.${'log'}(1)`,
    `// ${'TO'}DO later`,
    `read('/${'home'}/me/x')`,
  ];
  expect(unwantedWords([invented('apps/api/src/a.ts', lines.join('\n'))])).toEqual([
    'apps/api/src/a.ts:1 switches the type checker off',
    'apps/api/src/a.ts:2 switches lint off',
    'apps/api/src/a.ts:3 prints by console',
    'apps/api/src/a.ts:4 leaves a note of work undone',
    'apps/api/src/a.ts:5 names a folder of one machine',
  ]);
});

test('files are named in kebab-case for what they hold', () => {
  expect(badNames(files)).toEqual([]);
  const bad = [
    'apps/api/src/utils/a.ts',
    'apps/api/src/index.ts',
    'apps/api/src/pegCard.ts',
    'packages/shared/src/lakes/info.ts',
  ];
  expect(badNames(bad.map((path) => invented(path, '')))).toHaveLength(bad.length);
  const good = [
    'packages/db/src/data-source.ts',
    'apps/mobile/src/app/me/index.tsx',
    'packages/db/src/migrations/1780000000000-Lakes.ts',
  ];
  expect(badNames(good.map((path) => invented(path, '')))).toEqual([]);
});

test('nothing says any, exports a default or a star, prefixes an interface or titles a test with the banned word', () => {
  expect(looseCode(files)).toEqual([]);
});

test('each loose habit is found', () => {
  const text = [
    'export const a = (b: any) => b;',
    'interface IPeg { a: number }',
    "export * from './b';",
    'export default a;',
    `test('${'should'} work', () => undefined);`,
  ];
  expect(looseCode([invented('packages/shared/src/a.test.ts', text.join('\n'))])).toEqual([
    'packages/shared/src/a.test.ts:1 says any',
    'packages/shared/src/a.test.ts:2 marks an interface with an I',
    'packages/shared/src/a.test.ts:3 exports everything by a star',
    'packages/shared/src/a.test.ts:4 exports a default',
    `packages/shared/src/a.test.ts:5 titles a test with “${'should'}”`,
  ]);
});
