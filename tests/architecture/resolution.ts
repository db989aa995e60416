import { posix } from 'node:path';
import type { SourceFile } from './source-file';

/** What an import points at: a file of ours, or a package (with `node:` kept on the built-in ones). */
export type Target = { kind: 'ours'; path: string } | { kind: 'package'; name: string };

const endings = ['', '.ts', '.tsx', '.web.ts', '.web.tsx', '.mjs', '.js', '/index.ts', '/index.tsx'];
const ourPackages: Record<string, string> = {
  '@mereward/shared': 'packages/shared',
  '@mereward/db': 'packages/db',
  '@mereward/api': 'apps/api',
  '@mereward/mobile': 'apps/mobile',
};

/** Resolves a specifier the way the bundlers do, without touching the disk: `known` are the project's paths. */
export function targetOf(from: string, specifier: string, known: ReadonlySet<string>): Target {
  if (specifier.startsWith('.')) return ours(posix.join(posix.dirname(from), specifier), known);
  if (specifier.startsWith('@/')) return ours(`apps/mobile/src/${specifier.slice(2)}`, known);
  const [scope = '', name = '', ...rest] = specifier.split('/');
  const folder = ourPackages[`${scope}/${name}`];
  if (folder) return ours(`${folder}/src/${rest.join('/')}`, known);
  return { kind: 'package', name: scope.startsWith('@') ? `${scope}/${name}` : scope };
}

function ours(stem: string, known: ReadonlySet<string>): Target {
  const ending = endings.find((each) => known.has(stem + each)) ?? '';
  return { kind: 'ours', path: stem + ending };
}

export const pathsOf = (files: readonly SourceFile[]): Set<string> => new Set(files.map((file) => file.path));

export const isTest = (path: string): boolean => /\.test\.tsx?$/.test(path) || path.startsWith('tests/');
