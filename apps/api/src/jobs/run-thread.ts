import type { Worker } from 'node:worker_threads';
import { openThread, type ThreadName } from './thread';

export type Progress = { step: string; share: number };
/** What a thread may say while it works; whatever is not progress is its last word. */
export type ThreadWord = { kind: 'progress'; step: string; share: number } | { kind: string };

/** How often progress is told, and how soon a cancel is noticed. */
const EVERY_MS = 250;

/**
 * Runs a thread to its last word. Four times a second `mayGoOn` is told how far it is and answers whether to go on; the
 * thread is ended at once when it may not, and the answer is null.
 */
export async function runThread<Word extends ThreadWord>(
  name: ThreadName,
  given: unknown,
  mayGoOn: (progress: Progress) => Promise<boolean>,
): Promise<Exclude<Word, { kind: 'progress' }> | null> {
  const thread = openThread(name, given);
  const watch = watching(mayGoOn);
  try {
    return await Promise.race([lastWord<Word>(thread, watch.hear), watch.stopped]);
  } finally {
    watch.end();
    await thread.terminate();
  }
}

const isProgress = (word: ThreadWord): word is { kind: 'progress' } & Progress => word.kind === 'progress';

function lastWord<Word extends ThreadWord>(
  thread: Worker,
  hear: (progress: Progress) => void,
): Promise<Exclude<Word, { kind: 'progress' }>> {
  return new Promise((resolve, reject) => {
    thread.on('message', (word: Word) => {
      if (isProgress(word)) hear(word);
      else resolve(word as Exclude<Word, { kind: 'progress' }>); // what the thread's own file declares
    });
    thread.once('error', reject);
    thread.once('exit', (code) => reject(new Error(`The thread ended with code ${code}`)));
  });
}

function watching(mayGoOn: (progress: Progress) => Promise<boolean>) {
  let latest: Progress = { step: 'Beginning', share: 0 };
  let asking = false;
  let end = (): void => undefined;
  const stopped = new Promise<null>((resolve, reject) => {
    const timer = setInterval(() => {
      if (asking) return; // a slow database is asked once at a time
      asking = true;
      mayGoOn(latest)
        .then((go) => void (go || resolve(null)), reject)
        .finally(() => (asking = false));
    }, EVERY_MS);
    end = () => clearInterval(timer);
  });
  return { stopped, end: () => end(), hear: (progress: Progress) => void (latest = progress) };
}
