import { createHash } from 'node:crypto';
import { existsSync, readFileSync, readdirSync, statSync } from 'node:fs';
import { join, relative } from 'node:path';
import { at, root } from './paths.mjs';

const passedBy = new Set(['node_modules', 'expo-env.d.ts', 'dist', 'dist-next', '.expo', '.data']);

/** @param {string} path @returns {string[]} the files at or below a path that a build reads, in a fixed order */
function filesBelow(path) {
  if (!existsSync(path)) return [];
  if (statSync(path).isFile()) return /\.test\.tsx?$/.test(path) ? [] : [path];
  return readdirSync(path)
    .filter((name) => !passedBy.has(name))
    .sort()
    .flatMap((name) => filesBelow(join(path, name)));
}

/**
 * One number for the content of everything a build reads: equal when nothing changed, whatever the dates say.
 * @param {string[]} paths from the checkout's folder
 */
export function contentHash(paths) {
  const hash = createHash('sha256').update(process.version);
  for (const file of paths.flatMap((path) => filesBelow(at(path)))) {
    hash.update(`\0${relative(root, file)}\0`).update(readFileSync(file));
  }
  return hash.digest('hex');
}
