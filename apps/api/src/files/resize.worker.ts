import { parentPort, workerData } from 'node:worker_threads';
import { z } from 'zod';
import { stepAside } from '../jobs/step-aside';
import { resizePicture } from './resize-picture';

stepAside();
const { bytes, largePx } = z.object({ bytes: z.instanceof(Uint8Array), largePx: z.int() }).parse(workerData);
parentPort?.postMessage(
  await resizePicture(Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength), largePx),
);
