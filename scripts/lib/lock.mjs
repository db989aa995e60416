import { existsSync, linkSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { basename } from 'node:path';

/** Whether a process of ours with this number is running; the number may have passed to a stranger. @param {number} pid */
function isOurs(pid) {
  if (!Number.isInteger(pid) || pid <= 0) return false;
  try {
    process.kill(pid, 0);
  } catch (error) {
    if (!(error instanceof Error && 'code' in error && error.code === 'EPERM')) return false;
  }
  const command = `/proc/${pid}/cmdline`;
  return !existsSync(command) || /scripts[/\\]\w+\.mjs/.test(readFileSync(command, 'utf8'));
}

/**
 * Takes a lock that a crash can't leave shut: it names its holder, and a holder that is gone holds nothing.
 * @param {string} file
 * @returns {(() => void) | undefined} lets go of it; undefined when another run holds it
 */
export function tryLock(file) {
  const mine = `${file}.${process.pid}`;
  writeFileSync(mine, String(process.pid));
  try {
    for (let tries = 0; tries < 3; tries += 1) {
      try {
        linkSync(mine, file);
        return () => rmSync(file, { force: true });
      } catch {
        const holder = existsSync(file) ? Number(readFileSync(file, 'utf8')) : 0;
        if (holder === process.pid || isOurs(holder)) return undefined;
        rmSync(file, { force: true });
      }
    }
    return undefined;
  } finally {
    rmSync(mine, { force: true });
  }
}

/**
 * Does a piece of work while no other run of this checkout does it.
 * @template T
 * @param {string} file @param {(text: string) => void} note @param {() => Promise<T>} work
 * @returns {Promise<T>}
 */
export async function alone(file, note, work) {
  let release = tryLock(file);
  while (!release) {
    note(`waiting for another run of this checkout (${basename(file)})`);
    await new Promise((resolve) => setTimeout(resolve, 500));
    release = tryLock(file);
  }
  try {
    return await work();
  } finally {
    release();
  }
}
