import { spawn, spawnSync } from 'node:child_process';
import type { ChildProcessWithoutNullStreams } from 'node:child_process';
import { createInterface } from 'node:readline';

/**
 * A peer kept running: it prepares its input once, then for every line it is sent does the work once and answers one line
 * that starts with the milliseconds the work took.
 */
export class Peer {
  private readonly lines: AsyncIterator<string>;

  private constructor(private readonly child: ChildProcessWithoutNullStreams) {
    this.lines = createInterface({ input: child.stdout })[Symbol.asyncIterator]();
  }

  static start(command: string, args: readonly string[]): Peer {
    return new Peer(spawn(command, args));
  }

  /** One round; the words after the milliseconds are kept in `answer`. */
  answer = '';
  async round(): Promise<number> {
    this.child.stdin.write('go\n');
    const next = await this.lines.next();
    if (next.done === true) throw new Error('The peer ended without an answer.');
    const [milliseconds, ...rest] = next.value.split(' ');
    this.answer = rest.join(' ');
    return Number(milliseconds);
  }

  stop(): void {
    this.child.stdin.end();
  }
}

/** Does the command run and end well? Used to tell which peers this machine has. */
export function runs(command: string, args: readonly string[]): boolean {
  return spawnSync(command, args, { stdio: 'ignore', timeout: 30_000 }).status === 0;
}
