import type { LonLat } from './geodesic';

/** What can be said of an outline that somebody brought. */
export type OutlineFindingCode =
  | 'not-json'
  | 'byte-order-mark'
  | 'wrong-type'
  | 'missing-properties'
  | 'foreign-frame'
  | 'named-frame'
  | 'bad-position'
  | 'out-of-range'
  | 'left-out'
  | 'no-polygon'
  | 'several-waters'
  | 'line-as-shore'
  | 'unclosed'
  | 'too-few'
  | 'too-many'
  | 'too-winding'
  | 'repeated'
  | 'turned'
  | 'self-crossing'
  | 'island-outside'
  | 'islands-overlap'
  | 'no-area';

/**
 * One thing found in an outline, in plain words. `mended`: put right, look whether it is right; `refused`: the
 * outline can't be used until it is changed; `noted`: worth knowing. `at` is [lon, lat] where that helps.
 */
export type OutlineFinding = {
  kind: 'mended' | 'refused' | 'noted';
  code: OutlineFindingCode;
  words: string;
  at: [number, number] | null;
};

/** A finding, with the place told in words too when there is one. */
export function finding(
  [kind, code]: readonly [OutlineFinding['kind'], OutlineFindingCode],
  words: string,
  at: LonLat | null = null,
): OutlineFinding {
  return {
    kind,
    code,
    words: at ? `${words} (at ${placeWords(at)})` : words,
    at: at ? [at[0], at[1]] : null,
  };
}

/** "52.36610° N, 1.14170° W" */
export function placeWords([lon, lat]: LonLat): string {
  const east = lon < 0 ? 'W' : 'E';
  const north = lat < 0 ? 'S' : 'N';
  return `${Math.abs(lat).toFixed(5)}° ${north}, ${Math.abs(lon).toFixed(5)}° ${east}`;
}

export function isRefused(findings: readonly OutlineFinding[]): boolean {
  return findings.some(({ kind }) => kind === 'refused');
}
