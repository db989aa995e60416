import { spawn } from 'node:child_process';
import { root } from './paths.mjs';

const keptChars = 400_000;

/** @type {Set<import('node:child_process').ChildProcess>} */
const running = new Set();

/** @param {import('node:child_process').ChildProcess} child @param {NodeJS.Signals} signal */
export function signalGroup(child, signal) {
  if (child.pid === undefined) return;
  try {
    process.kill(-child.pid, signal);
  } catch {
    // The group has gone already.
  }
}

/**
 * Starts a program that its starter stops by itself, after everything that leans on it.
 * @param {string} command @param {string[]} args @param {import('node:child_process').SpawnOptions} [options]
 */
export const launchApart = (command, args, options) =>
  spawn(command, args, { cwd: root, detached: true, ...options });

/**
 * Starts a program in a process group of its own, so that Ctrl-C reaches this script alone and the
 * script decides the order in which things stop.
 * @param {string} command @param {string[]} args @param {import('node:child_process').SpawnOptions} [options]
 */
export function launch(command, args, options) {
  const child = launchApart(command, args, options);
  running.add(child);
  child.once('exit', () => running.delete(child));
  child.once('error', () => running.delete(child));
  return child;
}

/**
 * Runs a program to its end and keeps what it said.
 * @param {string} command @param {string[]} args
 * @param {import('node:child_process').SpawnOptions & { onText?: (text: string) => void, withinMs?: number }} [options] withinMs: it is stopped after so long
 * @returns {Promise<{ code: number, output: string }>} code: 127 when it could not be started, 128 when killed
 */
export function run(command, args, { onText, withinMs, ...options } = {}) {
  const child = launch(command, args, { stdio: ['ignore', 'pipe', 'pipe'], ...options });
  let output = '';
  /** @param {Buffer} chunk */
  const hear = (chunk) => {
    const text = chunk.toString();
    output = (output + text).slice(-keptChars);
    onText?.(text);
  };
  child.stdout?.on('data', hear);
  child.stderr?.on('data', hear);
  const late = withinMs === undefined ? undefined : setTimeout(tooLate, withinMs);
  function tooLate() {
    output += `\nIt had not ended after ${Math.round((withinMs ?? 0) / 60_000)} minutes and was stopped.\n`;
    signalGroup(child, 'SIGTERM');
    setTimeout(() => signalGroup(child, 'SIGKILL'), 5_000).unref();
  }
  return new Promise((resolve) => {
    child.once('exit', () => clearTimeout(late));
    child.once('error', (error) => resolve({ code: 127, output: `${output}${error.message}\n` }));
    child.once('close', (code) => {
      signalGroup(child, 'SIGKILL');
      resolve({ code: code ?? 128, output });
    });
  });
}

/** Asks everything still running to stop, and kills what has not stopped after five seconds. */
export async function stopAll() {
  const left = [...running];
  for (const child of left) signalGroup(child, 'SIGTERM');
  const gone = Promise.all(left.map((child) => exited(child)));
  await Promise.race([gone, pause(5_000)]);
  for (const child of left) signalGroup(child, 'SIGKILL');
}

/** @param {import('node:child_process').ChildProcess} child @returns {Promise<number>} */
export function exited(child) {
  if (child.exitCode !== null) return Promise.resolve(child.exitCode);
  if (child.signalCode !== null) return Promise.resolve(128);
  return new Promise((resolve) => {
    child.once('exit', (code) => resolve(code ?? 128));
    child.once('error', () => resolve(127));
  });
}

/** @param {number} delayMs @returns {Promise<void>} */
export const pause = (delayMs) => new Promise((resolve) => setTimeout(resolve, delayMs).unref());
