import { median } from './median';

/** One thing to time: does the work once and answers what it got wrong against the truth, in words, or null. */
export type Runner = () => string | null | Promise<string | null>;

/** A peer's own clock may leave out starting it and handing it the input: it answers the milliseconds of the work alone. */
export type PeerRunner = () => Promise<number>;

export type Comparison = {
  name: string;
  goal: string;
  ours: Runner;
  peer: { name: string; run: PeerRunner } | { name: string; missing: string } | null;
};

const ROUNDS = 5;

/** Runs ours and the peer turn by turn, five rounds after a first, and gives one line: medians, ratio, goal, error, memory. */
export async function comparisonLine({ name, goal, ours, peer }: Comparison): Promise<string> {
  const oursMs: number[] = [];
  const peerMs: number[] = [];
  let error: string | null = null;
  const before = residentMB(); // what earlier works and this one's input hold
  for (let round = 0; round <= ROUNDS; round++) {
    const started = performance.now();
    error = await ours();
    oursMs.push(performance.now() - started);
    if (peer !== null && 'run' in peer) peerMs.push(await peer.run());
  }
  const warm = median(oursMs.slice(1));
  const columns = [
    name,
    `ours ${milliseconds(warm)} (first ${milliseconds(oursMs[0]!)})`,
    peerColumn(peer, peerMs),
    peerMs.length > 0 ? `ratio ${(median(peerMs.slice(1)) / warm).toFixed(1)}×` : 'ratio –',
    `goal ${goal}`,
    ...(error === null ? [] : [error]),
    `${residentMB()} MB resident, ${before} before`,
  ];
  return columns.join(' | ');
}

const residentMB = (): number => Math.round(process.memoryUsage().rss / 1e6);

function peerColumn(peer: Comparison['peer'], peerMs: readonly number[]): string {
  if (peer === null) return 'no peer';
  if ('missing' in peer) return `${peer.name} not run: ${peer.missing}`;
  return `${peer.name} ${milliseconds(median(peerMs.slice(1)))} (first ${milliseconds(peerMs[0]!)})`;
}

const milliseconds = (ms: number): string => (ms >= 100 ? `${ms.toFixed(0)} ms` : `${ms.toFixed(1)} ms`);
