import { mkdirSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

/** The checkout's own folder. */
export const root = dirname(dirname(dirname(fileURLToPath(import.meta.url))));

/** Everything a run leaves behind: the private cluster, build marks, logs. Ignored by git. */
export const dataFolder = join(root, '.data');

/** @param {string[]} parts */
export const at = (...parts) => join(root, ...parts);

/**
 * A folder under the ignored one, made if it is missing.
 * @param {string[]} parts
 */
export function ownFolder(...parts) {
  const folder = join(dataFolder, ...parts);
  mkdirSync(folder, { recursive: true });
  return folder;
}
