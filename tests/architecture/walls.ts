import { isTest, pathsOf, targetOf } from './resolution';
import type { SourceFile } from './source-file';

type Room = 'shared' | 'db' | 'api' | 'mobile' | 'tests' | 'scripts' | 'settings';

const folders: [string, Room][] = [
  ['packages/shared/', 'shared'],
  ['packages/db/', 'db'],
  ['apps/api/', 'api'],
  ['apps/mobile/', 'mobile'],
  ['tests/', 'tests'],
  ['scripts/', 'scripts'],
];

const everywhere: Room[] = ['shared', 'db', 'api', 'mobile', 'tests', 'scripts', 'settings'];
const mayEnter: Record<Room, Room[]> = {
  shared: ['shared'],
  db: ['db', 'shared'],
  api: ['api', 'db', 'shared'],
  mobile: ['mobile', 'shared'],
  tests: everywhere,
  scripts: ['scripts'],
  settings: everywhere,
};

/** Packages a room may use; rooms not listed are held to their own package.json by the installer. */
const mayUse: Partial<Record<Room, string[]>> = {
  shared: ['zod', 'delaunator', 'geographiclib-geodesic'],
  db: ['typeorm', 'pg', 'reflect-metadata'],
};

export const roomOf = (path: string): Room =>
  folders.find(([start]) => path.startsWith(start))?.[1] ?? 'settings';

/** Imports that cross a wall, types included. */
export function crossedWalls(files: readonly SourceFile[]): string[] {
  const known = pathsOf(files);
  return files.flatMap((file) =>
    file.imports.flatMap(({ specifier, line }) => {
      const target = targetOf(file.path, specifier, known);
      const fault =
        target.kind === 'ours'
          ? wrongRoom(file.path, specifier, target.path)
          : wrongPackage(file.path, target.name);
      return fault ? [`${file.path}:${line} ${fault}`] : [];
    }),
  );
}

function wrongRoom(path: string, specifier: string, target: string): string | undefined {
  const from = roomOf(path);
  const to = roomOf(target);
  if (!mayEnter[from].includes(to)) return `${from} may not import ${to} (${specifier})`;
  const byName = !specifier.startsWith('.');
  if (from !== to && !byName && !isTest(path) && from !== 'settings')
    return `leaves its package by a relative path (${specifier})`;
  return undefined;
}

function wrongPackage(path: string, name: string): string | undefined {
  const room = roomOf(path);
  const builtIn = name.startsWith('node:');
  if (room === 'mobile' && builtIn && !isTest(path)) return `the client may not use ${name}`;
  const allowed = mayUse[room];
  if (!allowed || allowed.includes(name)) return undefined;
  if (isTest(path) && (builtIn || name === 'vitest' || name === 'fast-check')) return undefined;
  return `${room} may not use ${name}`;
}
