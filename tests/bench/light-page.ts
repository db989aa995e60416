import type { Browser } from '@playwright/test';
import { benchLine } from './bench-line';
import { median } from './median';

const ROUNDS = 5;
const ALLOWED_BYTES = 50_000;

type Painted = (browser: Browser, url: string) => Promise<number>;

/** The light page behind a peg card's code: its weight, and its first paint beside a page of one word's. */
export async function lightLines(
  browser: Browser,
  painted: Painted,
  { lightUrl, staticUrl }: { lightUrl: string; staticUrl: string },
): Promise<string[]> {
  const plain = await fetch(lightUrl, { headers: { 'Accept-Encoding': 'identity' } });
  const { byteLength } = await plain.arrayBuffer();
  const ours: number[] = [];
  const others: number[] = [];
  for (let round = 0; round < ROUNDS; round += 1) {
    ours.push(await painted(browser, lightUrl));
    others.push(await painted(browser, staticUrl));
  }
  return [
    benchLine({
      name: 'client: the light page of a peg in all, bytes before packing',
      ours: byteLength,
      other: { name: 'allowed', figure: ALLOWED_BYTES },
      goal: '≤ 1',
    }),
    benchLine({
      name: 'client: first paint of the light page, slow phone on slow 4G, ms',
      ours: median(ours),
      other: { name: 'a static page', figure: median(others) },
      goal: '≤ 1.2',
    }),
  ];
}
