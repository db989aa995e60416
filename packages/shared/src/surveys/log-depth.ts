import type { DepthUnit, LogOptions } from './log-contract';
import { depthInMetres } from './log-numbers';

/** The depth below the surface that a number of the file means, metres. */
export function depthMeant(value: number, unit: DepthUnit, options: LogOptions): number {
  const lengthM = depthInMetres(value, unit);
  return options.depthMeans === 'depth' ? lengthM + options.transducerM : options.waterHeightM - lengthM;
}

export type DepthChoice = { key: string; words: string; count: number };

/** A place where a file may keep its depths, and in how many of its points a number stands there. */
export class DepthChoices {
  private readonly counts = new Map<string, number>();

  add(key: string): void {
    this.counts.set(key, (this.counts.get(key) ?? 0) + 1);
  }

  count(key: string): number {
    return this.counts.get(key) ?? 0;
  }

  /** Most used first. */
  list(wordsOf: (key: string) => string): DepthChoice[] {
    return [...this.counts]
      .map(([key, count]) => ({ key, words: wordsOf(key), count }))
      .sort((a, b) => b.count - a.count || (a.key < b.key ? -1 : 1))
      .slice(0, 40);
  }
}
