import { readFile } from 'node:fs/promises';
import { parentPort, workerData } from 'node:worker_threads';
import { z } from 'zod';
import { stepAside } from '../jobs/step-aside';
import { resizePicture } from './resize-picture';

stepAside();
const { path } = z.object({ path: z.string() }).parse(workerData);
parentPort?.postMessage(await resizePicture(await readFile(path)));
