import { z } from 'zod';
import { openThread } from '../jobs/thread';
import type { FileKey, PhotoPart } from './file-key';
import { readWhole, type FileStore } from './store';

const Answer = z.discriminatedUnion('kind', [
  z.object({
    kind: z.literal('done'),
    widthPx: z.int(),
    heightPx: z.int(),
    large: z.instanceof(Uint8Array),
    small: z.instanceof(Uint8Array),
  }),
  z.object({ kind: z.literal('refused'), words: z.string() }),
]);
type Answer = z.infer<typeof Answer>;

const LONGEST_MS = 150_000;
const LAST_ATTEMPT = 3; // then the picture is to blame; the queue itself goes on while the store is away

type Bytes = Uint8Array<ArrayBuffer>;

/** What becomes of a picture's row. */
export type Outcome =
  { state: 'ready'; widthPx: number; heightPx: number } | { state: 'refused'; refusal: string };

/** A picture that was sent and waits to be turned and resized. */
export type Waiting = {
  folder: FileKey;
  fileOf: (part: PhotoPart) => FileKey;
  /** Does its row still wait? */
  waits: () => Promise<boolean>;
  /** Writes what became of it; false when its row waits no more. */
  settle: (outcome: Outcome) => Promise<boolean>;
};

/** `largePx` is the longer side of the large size. */
type Terms = { attempt: number; largePx: number };

/** Turns and resizes one picture in a thread of its own, then forgets what was sent. Done twice it changes nothing. */
export async function makeReady(store: FileStore, waiting: Waiting, terms: Terms): Promise<void> {
  const { fileOf, folder } = waiting;
  if (!(await waiting.waits())) return store.remove(fileOf('original'));
  const answer = await resized(await readWhole(store, fileOf('original')), terms);
  if (answer.kind === 'done') {
    await store.write(fileOf('large.jpg'), answer.large);
    await store.write(fileOf('small.jpg'), answer.small);
  }
  if (await waiting.settle(outcome(answer))) await store.remove(fileOf('original'));
  else await store.removeFolder(folder); // taken away meanwhile
}

const outcome = (answer: Answer): Outcome =>
  answer.kind === 'done'
    ? { state: 'ready' as const, widthPx: answer.widthPx, heightPx: answer.heightPx }
    : { state: 'refused' as const, refusal: answer.words };

async function resized(bytes: Bytes | null, { attempt, largePx }: Terms): Promise<Answer> {
  if (bytes === null)
    return { kind: 'refused', words: 'This picture was lost here before it was ready. Send it again.' };
  try {
    return await inThread(bytes, largePx);
  } catch (error) {
    if (attempt < LAST_ATTEMPT) throw error;
    return {
      kind: 'refused',
      words: 'This picture could not be opened here. Make it smaller and send it again.',
    };
  }
}

function inThread(bytes: Bytes, largePx: number): Promise<Answer> {
  const thread = openThread('files/resize', { bytes, largePx });
  const answer = new Promise<Answer>((resolve, reject) => {
    const late = setTimeout(() => reject(new Error('resizing took too long')), LONGEST_MS);
    const settle = (deed: () => void) => {
      clearTimeout(late);
      deed();
    };
    thread.once('message', (message) => settle(() => resolve(Answer.parse(message))));
    thread.once('error', (error) => settle(() => reject(error)));
    thread.once('exit', (code) => settle(() => reject(new Error(`the thread ended with ${code}`))));
  });
  return answer.finally(() => thread.terminate());
}
