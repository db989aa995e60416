import { onReturn } from '@/lib/on-return';

const ASK_EVERY_MS = 30_000;

export type Watching = {
  /** The kind of event that is listened for. */
  event: string;
  heard: (data: string) => void;
  /** Something may have happened unheard: ask afresh. */
  missed: () => void;
};

/** Where there are no streams of events it is asked for every half minute, and on coming back. Answers how to stop. */
export function watchStream(_url: string, { missed }: Watching): () => void {
  const timer = setInterval(missed, ASK_EVERY_MS);
  const leave = onReturn(missed);
  return () => {
    clearInterval(timer);
    leave();
  };
}
