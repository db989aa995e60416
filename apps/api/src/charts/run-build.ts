import type { Worker } from 'node:worker_threads';
import { openThread } from '../jobs/thread';
import type { BuildWord } from './build.worker';
import type { BuildSource } from './build-source';
import type { MadeChart } from './make-chart';

export type BuildEnd =
  { kind: 'made'; chart: MadeChart } | { kind: 'refused'; words: string } | { kind: 'stopped' }; // by `mayGoOn`

export type Progress = { step: string; share: number };

/** How often progress is told, and how soon a cancel is noticed. */
const EVERY_MS = 250;

/**
 * Builds in a thread. Four times a second `mayGoOn` is told how far it is and answers whether to go on; the thread is
 * ended at once when it may not.
 */
export async function runBuild(
  source: BuildSource,
  mayGoOn: (progress: Progress) => Promise<boolean>,
): Promise<BuildEnd> {
  const thread = openThread('charts/build', source);
  const watch = watching(thread, mayGoOn);
  try {
    return await Promise.race([ending(thread, watch.hear), watch.stopped]);
  } finally {
    watch.end();
    await thread.terminate();
  }
}

function ending(thread: Worker, hear: (progress: Progress) => void): Promise<BuildEnd> {
  return new Promise((resolve, reject) => {
    thread.on('message', (word: BuildWord) => {
      if (word.kind === 'progress') hear(word);
      else resolve(word);
    });
    thread.once('error', reject);
    thread.once('exit', (code) => reject(new Error(`The building thread ended with code ${code}`)));
  });
}

function watching(thread: Worker, mayGoOn: (progress: Progress) => Promise<boolean>) {
  let latest: Progress = { step: 'Beginning', share: 0 };
  let asking = false;
  let end = (): void => undefined;
  const stopped = new Promise<BuildEnd>((resolve, reject) => {
    const timer = setInterval(() => {
      if (asking) return; // a slow database is asked once at a time
      asking = true;
      mayGoOn(latest)
        .then((go) => void (go || resolve({ kind: 'stopped' })), reject)
        .finally(() => (asking = false));
    }, EVERY_MS);
    end = () => clearInterval(timer);
  });
  return { stopped, end: () => end(), hear: (progress: Progress) => void (latest = progress), thread };
}
