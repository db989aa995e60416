import type { OutboxSnapshot } from '@/lib/outbox';

/** How the queue stands, in one line. */
export type Standing = {
  words: string;
  tone: 'inkSoft' | 'amber' | 'brick' | 'reed';
  shape: 'triangle' | 'ring' | 'cross' | 'bar';
};

type Facts = Pick<OutboxSnapshot, 'others' | 'locked'> & {
  waiting: number;
  refused: number;
  noSignal: boolean;
  /** "21:20"; '' when nothing has been sent from this device yet. */
  lastSent: string;
};

const things = (count: number): string => (count === 1 ? '1 thing' : `${String(count)} things`);

/** "No signal · 3 waiting · last sent 21:20". Null when there is nothing to say. */
export function standing({ waiting, refused, others, locked, noSignal, lastSent }: Facts): Standing | null {
  const mine = waiting + locked;
  const parts = [
    noSignal ? 'No signal' : '',
    refused > 0 ? `${String(refused)} refused` : '',
    mine > 0 ? `${String(mine)} waiting` : '',
    lastSent === '' ? '' : mine + refused > 0 ? `last sent ${lastSent}` : `all sent ${lastSent}`,
    others > 0 ? othersWords(others) : '',
  ].filter(Boolean);
  if (parts.length === 0) return null;
  const words = parts.join(' · ');
  const look =
    refused > 0
      ? ({ tone: 'brick', shape: 'cross' } as const)
      : mine > 0 || noSignal
        ? ({ tone: 'amber', shape: noSignal ? 'bar' : 'ring' } as const)
        : ({ tone: 'inkSoft', shape: others > 0 ? 'ring' : 'triangle' } as const);
  return { words: words.charAt(0).toUpperCase() + words.slice(1), ...look };
}

/** What may be told of another person's things: how many, and nothing else. */
export const othersWords = (others: number): string =>
  `${things(others)} of another person ${others === 1 ? 'waits' : 'wait'} on this phone`;
