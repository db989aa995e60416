import { runThread, type Progress } from '../jobs/run-thread';
import type { BuildWord } from './build.worker';
import type { BuildSource } from './build-source';
import type { MadeChart } from './make-chart';

export type { Progress } from '../jobs/run-thread';

export type BuildEnd =
  { kind: 'made'; chart: MadeChart } | { kind: 'refused'; words: string } | { kind: 'stopped' }; // by `mayGoOn`

/** Builds in a thread, for as long as `mayGoOn` says so. */
export async function runBuild(
  source: BuildSource,
  mayGoOn: (progress: Progress) => Promise<boolean>,
): Promise<BuildEnd> {
  return (await runThread<BuildWord>('charts/build', source, mayGoOn)) ?? { kind: 'stopped' };
}
