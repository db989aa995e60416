import { Photo } from '@mereward/db/entities/files/photo';
import { existsSync } from 'node:fs';
import { z } from 'zod';
import { openThread } from '../jobs/thread';
import type { Handler } from '../jobs/worker';
import { fileStore } from './store';

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
const LAST_ATTEMPT = 3; // the queue tries three times

/** Turns and resizes one photo in a thread of its own, then forgets what was sent. Done twice it changes nothing. */
export const resizePhoto: Handler = async ({ payload, attempt }, { source, config }) => {
  const { photoId } = Payload.parse(payload);
  const store = fileStore(config.filesDir);
  const waiting = { id: photoId, state: 'waiting' as const };
  if (!(await source.manager.existsBy(Photo, waiting))) return store.remove(photoId, 'original');
  const answer = await resized(store.pathOf(photoId, 'original'), attempt);
  if (answer.kind === 'done') {
    await store.write(photoId, 'large.jpg', answer.large);
    await store.write(photoId, 'small.jpg', answer.small);
  }
  const { affected } = await source.manager.update(Photo, waiting, outcome(answer));
  if (affected !== 1)
    await store.removeAll(photoId); // taken away meanwhile
  else await store.remove(photoId, 'original');
};

const outcome = (answer: Answer) =>
  answer.kind === 'done'
    ? { state: 'ready' as const, widthPx: answer.widthPx, heightPx: answer.heightPx }
    : { state: 'refused' as const, refusal: answer.words };

async function resized(path: string, attempt: number): Promise<Answer> {
  if (!existsSync(path))
    return { kind: 'refused', words: 'This picture was lost here before it was ready. Send it again.' };
  try {
    return await inThread(path);
  } catch (error) {
    if (attempt < LAST_ATTEMPT) throw error;
    return {
      kind: 'refused',
      words: 'This picture could not be opened here. Make it smaller and send it again.',
    };
  }
}

function inThread(path: string): Promise<Answer> {
  const thread = openThread('files/resize', { path });
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
