import { Piscina } from 'piscina';
import { z } from 'zod';
import { threadEntry } from '../../jobs/thread';
import type { PaperGiven } from './paper.worker';

/** A thread that stands by for a while: papers are asked for in twos and threes, and the faces are read but once. */
const STANDS_BY_MS = 60_000;

let drawing: Piscina | null = null;

function thread(): Piscina {
  if (drawing) return drawing;
  const { url, execArgv } = threadEntry('charts/papers/paper');
  drawing = new Piscina({
    filename: url.href,
    execArgv,
    minThreads: 0,
    maxThreads: 1,
    idleTimeout: STANDS_BY_MS,
  });
  return drawing;
}

/** Draws a paper beside the server: up to a second's work, which nobody else's answer should wait for. */
export async function drawPaper(given: PaperGiven): Promise<Buffer> {
  return Buffer.from(z.instanceof(Uint8Array).parse(await thread().run(given)));
}
