import type { Watching } from '@/lib/event-stream';
import { onReturn } from '@/lib/on-return';

const ASK_EVERY_MS = 30_000;
/** The server gives a sign of life every twenty seconds: after twice that and a little the stream is dead. */
const SILENT_MS = 45_000;

/**
 * Listens to a stream of events, whatever happens to it: a browser that gave up, a phone that slept and a network that
 * swallows everything are found out by the silence, and the stream is opened anew. While there is none it is asked for
 * every half minute. Answers how to stop.
 */
export function watchStream(url: string, { event, heard, missed }: Watching): () => void {
  let source: EventSource | null = null;
  let signAt = 0; // when the stream last gave a sign of life

  const sign = (): void => {
    signAt = Date.now();
  };
  function open(): void {
    source?.close();
    sign();
    source = new EventSource(url);
    source.addEventListener('open', sign);
    source.addEventListener('beat', sign);
    source.addEventListener(event, ({ data }: MessageEvent<string>) => {
      sign();
      heard(data);
    });
  }
  const isAlive = (): boolean => source?.readyState === EventSource.OPEN && Date.now() - signAt < SILENT_MS;
  const look = (): void => {
    if (isAlive()) return;
    open();
    missed();
  };

  open();
  const timer = setInterval(look, ASK_EVERY_MS);
  const leave = onReturn(look);
  return () => {
    clearInterval(timer);
    leave();
    source?.close();
  };
}
