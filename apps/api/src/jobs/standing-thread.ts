import { Piscina } from 'piscina';
import { z } from 'zod';
import { threadEntry, type ThreadName } from './thread';

/** A thread that stands by for a while: papers are asked for in twos and threes, and the faces are read but once. */
const STANDS_BY_MS = 60_000;

/** One thread of a name for work of up to a second that answers bytes; started when it is first asked for. */
export function standingThread<Given>(name: ThreadName): (given: Given) => Promise<Buffer> {
  let standing: Piscina | null = null;
  const thread = (): Piscina => {
    if (standing) return standing;
    const { url, execArgv } = threadEntry(name);
    standing = new Piscina({
      filename: url.href,
      execArgv,
      minThreads: 0,
      maxThreads: 1,
      idleTimeout: STANDS_BY_MS,
    });
    return standing;
  };
  return async (given) => Buffer.from(z.instanceof(Uint8Array).parse(await thread().run(given)));
}
