import { request, type IncomingMessage } from 'node:http';

export type StreamEvent = { id: string | null; event: string; data: string };

export type OpenStream = {
  status: number;
  headers: IncomingMessage['headers'];
  events: readonly StreamEvent[];
  /** Waits until an event comes that was not asked for yet. */
  next: (of?: string) => Promise<StreamEvent>;
  ended: Promise<void>;
  close: () => void;
};

/** Reads a text/event-stream over a socket of its own, as HTML’s section on server-sent events has it. */
export async function anEventStream(url: string, headers: Record<string, string> = {}): Promise<OpenStream> {
  const asked = request(url, { headers: { 'Accept-Encoding': 'gzip, br', ...headers }, agent: false });
  const answer = await new Promise<IncomingMessage>((come, fail) => {
    asked.on('response', come);
    asked.on('error', fail);
    asked.end();
  });
  const events: StreamEvent[] = [];
  const seen = new Set<StreamEvent>();
  let waiting: (() => void)[] = [];
  let text = '';
  answer.setEncoding('utf8');
  answer.on('error', () => undefined);
  answer.on('data', (part: string) => {
    text += part;
    const blocks = text.split('\n\n');
    text = blocks.pop() ?? '';
    for (const block of blocks) {
      const field = (name: string) =>
        block
          .split('\n')
          .find((line) => line.startsWith(`${name}: `))
          ?.slice(name.length + 2);
      const data = field('data');
      if (data !== undefined) events.push({ id: field('id') ?? null, event: field('event') ?? '', data });
    }
    const woken = waiting;
    waiting = [];
    for (const wake of woken) wake();
  });
  const ended = new Promise<void>((end) => answer.once('close', end));
  return {
    status: answer.statusCode ?? 0,
    headers: answer.headers,
    events,
    async next(of = 'board') {
      for (;;) {
        const found = events.find((each) => each.event === of && !seen.has(each));
        if (found) {
          seen.add(found);
          return found;
        }
        await new Promise<void>((wake) => waiting.push(wake));
      }
    },
    ended,
    close: () => void asked.destroy(),
  };
}
