/**
 * Source: fixtures/bottom_kernel.json, computed by numerical integration in numpy and scipy (Gauss–Hermite over the place
 * of a cast, Gauss–Legendre along its drag), which shares nothing with the closed forms tested here. Its `meta` says
 * where each tolerance comes from.
 */
import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { bottomMap, leaveOneOutScore } from '@mereward/shared/charts/bottom-map';
import { castKernel } from '@mereward/shared/charts/cast-kernel';
import { errorFunction } from '@mereward/shared/charts/error-function';

const Spread = z.object({ xx: z.number(), xy: z.number(), yy: z.number() }).nullable();
const Track = z.object({ xM: z.number(), yM: z.number() }).nullable();
const fixture = z
  .object({
    meta: z.object({
      tolerance: z.object({ erf: z.number(), weight: z.number(), probability: z.number() }),
    }),
    erf: z.array(z.object({ x: z.number(), erf: z.number() })),
    kernel: z.array(
      z.object({
        bandwidthM: z.number(),
        spread: Spread,
        track: Track,
        dxM: z.number(),
        dyM: z.number(),
        weight: z.number(),
      }),
    ),
    map: z.object({
      bandwidthM: z.number(),
      casts: z.array(
        z.object({
          xM: z.number(),
          yM: z.number(),
          shares: z.array(z.number()),
          spread: Spread,
          track: Track,
          worthCasts: z.number(),
        }),
      ),
      places: z.array(z.object({ xM: z.number(), yM: z.number(), p: z.array(z.number()) })),
      leaveOneOut: z.number(),
    }),
  })
  .parse(JSON.parse(readFileSync(new URL('../fixtures/bottom_kernel.json', import.meta.url), 'utf8')));
const { tolerance } = fixture.meta;

test.each(fixture.erf)('erf of $x is $erf', ({ x, erf }) => {
  expect(Math.abs(errorFunction(x) - erf)).toBeLessThanOrEqual(tolerance.erf);
});

describe('the weight of one cast', () => {
  test.each(fixture.kernel)(
    'with bandwidth $bandwidthM m, place $spread, drag $track, at $dxM, $dyM',
    ({ bandwidthM, spread, track, dxM, dyM, weight }) => {
      const kernel = castKernel(
        { xM: 0, yM: 0, spread: spread ?? undefined, track: track ?? undefined },
        { bandwidthM, reach: 3 },
      );
      expect(Math.abs(kernel.weightAt(dxM, dyM) - weight)).toBeLessThanOrEqual(tolerance.weight);
    },
  );
});

describe('the map of a dozen casts', () => {
  const { casts: raw, places, bandwidthM, leaveOneOut } = fixture.map;
  const casts = raw.map(({ spread, track, ...cast }) => ({
    ...cast,
    spread: spread ?? undefined,
    track: track ?? undefined,
  }));
  const frame = { columns: 13, rows: 13, cellM: 1, originM: { xM: 0, yM: 0 } };
  const nodes = { frame, nodes: Int32Array.from({ length: 169 }, (_, i) => i) };
  const map = bottomMap(casts, nodes, bandwidthM);

  test.each(places)('names the likeliest class at $xM, $yM with its probability', ({ xM, yM, p }) => {
    const node = yM * frame.columns + xM;
    const best = Math.max(...p);
    expect(map.classes[node]).toBe(p.indexOf(best));
    expect(Math.abs(map.confidence[node]! - best)).toBeLessThanOrEqual(tolerance.probability);
  });

  test('foretells casts left out with the same mean log score', () => {
    expect(Math.abs(leaveOneOutScore(casts, bandwidthM) - leaveOneOut)).toBeLessThanOrEqual(
      2 * tolerance.probability,
    );
  });
});
