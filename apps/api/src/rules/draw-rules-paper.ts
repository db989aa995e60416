import { Piscina } from 'piscina';
import { z } from 'zod';
import { threadEntry } from '../jobs/thread';
import type { SheetPaper } from './sheet-paper';

const STANDS_BY_MS = 60_000;

let drawing: Piscina | null = null;

function thread(): Piscina {
  if (drawing) return drawing;
  const { url, execArgv } = threadEntry('rules/sheet');
  drawing = new Piscina({
    filename: url.href,
    execArgv,
    minThreads: 0,
    maxThreads: 1,
    idleTimeout: STANDS_BY_MS,
  });
  return drawing;
}

/** Draws the rules beside the server: three hundred of them in large print take a while. */
export async function drawRulesPaper(paper: SheetPaper): Promise<Buffer> {
  return Buffer.from(z.instanceof(Uint8Array).parse(await thread().run(paper)));
}
