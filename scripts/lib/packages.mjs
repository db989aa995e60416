import { createHash } from 'node:crypto';
import { existsSync, readFileSync, readdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { Halt } from './halt.mjs';
import { toolEnvironment } from './machine.mjs';
import { at, ownFolder } from './paths.mjs';
import { run } from './run.mjs';

/** @returns {string[]} folders of the workspace, the checkout's own first */
function workspaceFolders() {
  const inside = ['apps', 'packages'].flatMap((group) =>
    readdirSync(at(group)).map((name) => at(group, name)),
  );
  return [at(), ...inside].filter((folder) => existsSync(join(folder, 'package.json')));
}

/** @param {string} folder @returns {Record<string, unknown>} */
const manifest = (folder) => JSON.parse(readFileSync(join(folder, 'package.json'), 'utf8'));

function wanted() {
  const hash = createHash('sha256').update(process.version);
  for (const file of [at('pnpm-lock.yaml'), at('pnpm-workspace.yaml')]) hash.update(readFileSync(file));
  for (const folder of workspaceFolders()) hash.update(readFileSync(join(folder, 'package.json')));
  return hash.digest('hex');
}

/** Whether every dependency that a package declares can be reached from it. */
function complete() {
  return workspaceFolders().every((folder) => {
    const { dependencies = {}, devDependencies = {} } = manifest(folder);
    const names = [...Object.keys(Object(dependencies)), ...Object.keys(Object(devDependencies))];
    return names.every((name) => existsSync(join(folder, 'node_modules', name, 'package.json')));
  });
}

/**
 * Installs exactly what the lock file says, or nothing when that has been done.
 * @param {(text: string) => void} note
 */
export async function installDependencies(note) {
  const mark = join(ownFolder('built'), 'packages');
  const wish = wanted();
  if (existsSync(mark) && readFileSync(mark, 'utf8') === wish && complete()) return note('unchanged');
  const { packageManager } = manifest(at());
  note(`${packageManager}, from the lock file`);
  const args = ['-y', String(packageManager), 'install', '--frozen-lockfile'];
  const installed = await run('npx', args, {
    env: toolEnvironment(),
    onText: (text) => progressOf(text, note),
  });
  if (installed.code !== 0) {
    throw new Halt(
      `The packages could not be installed. Is the network there? pnpm said:\n${installed.output.slice(-2500)}`,
    );
  }
  writeFileSync(mark, wish);
}

/** @param {string} text @param {(text: string) => void} note */
function progressOf(text, note) {
  const line = /Progress: .*?added \d+/.exec(text)?.[0];
  if (line) note(line.replace('Progress: ', ''));
}
