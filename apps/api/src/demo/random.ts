import { createHash } from 'node:crypto';

/** Mulberry32: the demo is the same on any machine, for a given seed. */
export function seeded(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4_294_967_296;
  };
}

/** A standard normal draw (Box–Muller). */
export const normal = (random: () => number): number =>
  Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());

export function pick<T extends string>(random: () => number, shares: Record<T, number>): T {
  const entries = Object.entries(shares) as [T, number][];
  const total = entries.reduce((sum, [, share]) => sum + share, 0);
  let left = random() * total;
  for (const [name, share] of entries) {
    left -= share;
    if (left < 0) return name;
  }
  return entries[entries.length - 1]![0];
}

/** A stable id for a thing of the demo, of UUID form (version 8: made by our own rule, RFC 9562 §5.8). */
export function demoId(name: string): string {
  const hex = createHash('sha256').update(`demo:${name}`).digest('hex');
  return `${hex.slice(0, 8)}-${hex.slice(8, 12)}-8${hex.slice(13, 16)}-a${hex.slice(17, 20)}-${hex.slice(20, 32)}`;
}
