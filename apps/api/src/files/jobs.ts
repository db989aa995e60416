import { Photo } from '@mereward/db/entities/files/photo';
import { z } from 'zod';
import { openThread } from '../jobs/thread';
import type { Handler } from '../jobs/worker';
import { photoFile, photoFolder } from './file-key';
import { fileStoreOf, readWhole } from './store';

const Payload = z.object({ photoId: z.uuid() });

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

/** Turns and resizes one photo in a thread of its own, then forgets what was sent. Done twice it changes nothing. */
export const resizePhoto: Handler = async ({ payload, attempt }, { source, config }) => {
  const { photoId } = Payload.parse(payload);
  const store = fileStoreOf(config);
  const original = photoFile(photoId, 'original');
  const waiting = { id: photoId, state: 'waiting' as const };
  if (!(await source.manager.existsBy(Photo, waiting))) return store.remove(original);
  const answer = await resized(await readWhole(store, original), attempt);
  if (answer.kind === 'done') {
    await store.write(photoFile(photoId, 'large.jpg'), answer.large);
    await store.write(photoFile(photoId, 'small.jpg'), answer.small);
  }
  const { affected } = await source.manager.update(Photo, waiting, outcome(answer));
  if (affected !== 1)
    await store.removeFolder(photoFolder(photoId)); // taken away meanwhile
  else await store.remove(original);
};

const outcome = (answer: Answer) =>
  answer.kind === 'done'
    ? { state: 'ready' as const, widthPx: answer.widthPx, heightPx: answer.heightPx }
    : { state: 'refused' as const, refusal: answer.words };

async function resized(bytes: Bytes | null, attempt: number): Promise<Answer> {
  if (bytes === null)
    return { kind: 'refused', words: 'This picture was lost here before it was ready. Send it again.' };
  try {
    return await inThread(bytes);
  } catch (error) {
    if (attempt < LAST_ATTEMPT) throw error;
    return {
      kind: 'refused',
      words: 'This picture could not be opened here. Make it smaller and send it again.',
    };
  }
}

function inThread(bytes: Bytes): Promise<Answer> {
  const thread = openThread('files/resize', { bytes });
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
