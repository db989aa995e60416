import { photoFault } from '@mereward/api/files/photo-fault';
import { LARGE_PX } from '@mereward/api/files/photo-sizes';
import { resizePicture } from '@mereward/api/files/resize-picture';
import { receiveFile } from '@mereward/api/http/upload';
import { openThread } from '@mereward/api/jobs/thread';
import { PHOTO_MOST_BYTES } from '@mereward/shared/files/contract';
import { createHash } from 'node:crypto';
import { once } from 'node:events';
import { createServer, type RequestListener, type Server } from 'node:http';
import { createRequire } from 'node:module';
import { monitorEventLoopDelay } from 'node:perf_hooks';
import { fileURLToPath } from 'node:url';
import { aJpeg, CORNERS } from '../support/pictures';
import { median } from './median';

const ROUNDS = 5;

/** The longest this thread was kept from answering while `work` ran, ms. */
async function longestBlockMs(work: () => Promise<unknown>): Promise<number> {
  const delay = monitorEventLoopDelay({ resolution: 1 });
  delay.enable();
  await work();
  await new Promise((next) => setTimeout(next, 5)); // a block is told when it is over
  delay.disable();
  return delay.max / 1e6;
}

type Handler = (...asked: Asked) => Promise<void>;
type Asked = [request: Parameters<typeof receiveFile>[0], response: Parameters<typeof receiveFile>[1]];
type Express = { post: (path: string, handler: Handler) => void } & RequestListener;

/** Takes a photo in as the API does: received, judged by its header, known by its digest. */
async function photoServer(): Promise<{ server: Server; url: string }> {
  const fromApi = createRequire(fileURLToPath(import.meta.resolve('@mereward/api/app')));
  const express: () => Express = fromApi('express');
  const app = express();
  app.post('/', async (req, res) => {
    const { bytes } = await receiveFile(req, res, { field: 'photo', mostBytes: PHOTO_MOST_BYTES });
    res.json({ fault: photoFault(bytes), sha256: createHash('sha256').update(bytes).digest('hex') });
  });
  const server = createServer(app).listen(0, '127.0.0.1');
  await once(server, 'listening');
  const address = server.address();
  if (address === null || typeof address === 'string') throw new Error('The server has no port');
  return { server, url: `http://127.0.0.1:${address.port}/` };
}

async function inThread(bytes: Uint8Array): Promise<void> {
  const thread = openThread('files/resize', { bytes, largePx: LARGE_PX });
  await once(thread, 'message');
  await thread.terminate();
}

/** One line: how long a photo of twelve megapixels keeps the API from answering, beside resizing it there. */
export async function benchPhotos(): Promise<string[]> {
  const bytes = await aJpeg({ widthPx: 4000, heightPx: 3000 }, CORNERS);
  const { server, url } = await photoServer();
  const send = () => {
    const form = new FormData();
    form.set('photo', new Blob([new Uint8Array(bytes)]), 'photo.jpg');
    return fetch(url, { method: 'POST', body: form });
  };
  try {
    const ours: number[] = [];
    const here: number[] = [];
    for (let round = 0; round < ROUNDS; round += 1) {
      ours.push(await longestBlockMs(async () => Promise.all([send(), inThread(bytes)])));
      here.push(await longestBlockMs(() => resizePicture(bytes)));
    }
    const [oursMs, hereMs] = [median(ours), median(here)];
    const figures = [oursMs, hereMs, oursMs / hereMs].map((figure) => figure.toFixed(2));
    return [
      `photos: 12 MP, longest wait of the API, ms  ${figures[0]}  resized on its own thread  ${figures[1]}  ratio  ${figures[2]}  goal ≤ 50 ms`,
    ];
  } finally {
    server.close();
  }
}
