import { readlinkSync } from 'node:fs';
import { setPriority } from 'node:os';

const BEHIND = 10;

/**
 * Called by a thread of heavy work: lets the server's own thread go first when cores are short. Linux gives a
 * priority to one thread by its own number; elsewhere it would be the whole process's, so nothing is done.
 */
export function stepAside(): void {
  try {
    const thread = Number(readlinkSync('/proc/thread-self').split('/').at(-1));
    if (Number.isInteger(thread) && thread !== process.pid) setPriority(thread, BEHIND);
  } catch {
    return; // no such file system, or not allowed: the work is the same, only less polite
  }
}
