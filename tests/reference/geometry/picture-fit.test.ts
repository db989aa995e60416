/**
 * Source: fixtures/15_picture_fit.json, computed with numpy by another way than the product's (SVD of the covariance,
 * Umeyama 1991; linalg.lstsq for affinities). Its first case is the example printed in that paper.
 * Tolerances are the fixture's own: doubles on both sides, and three printed digits.
 */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import {
  metresPerPixel,
  onPlane,
  pictureFit,
  type PictureTransform,
} from '@mereward/shared/geometry/picture-fit';
import { fixture } from '../charts/fixtures';

const Transform = z.object({
  xx: z.number(),
  xy: z.number(),
  x0: z.number(),
  yx: z.number(),
  yy: z.number(),
  y0: z.number(),
});
const { meta, cases } = fixture(
  '15_picture_fit.json',
  z.object({
    meta: z.object({
      printed: z.object({ c: z.number(), r: z.array(z.array(z.number())), t: z.array(z.number()) }),
      tolerance: z.object({ coefficient: z.number(), metres: z.number(), printed: z.number() }),
    }),
    cases: z.array(
      z.object({
        name: z.string(),
        kind: z.enum(['similarity', 'affine']),
        points: z.array(z.object({ xPx: z.number(), yPx: z.number(), xM: z.number(), yM: z.number() })),
        transform: Transform,
        residualsM: z.array(z.number()),
        rmsM: z.number(),
        sigmaM: z.number().nullable(),
      }),
    ),
  }),
);
const { tolerance, printed } = meta;

describe('a picture fitted to the plane', () => {
  test.each(cases)('$name: agrees with numpy', ({ kind, points, transform, residualsM, rmsM, sigmaM }) => {
    const fit = pictureFit(
      points.map(({ xPx, yPx, xM, yM }) => ({ xPx, yPx, at: { xM, yM } })),
      kind,
    );
    if (!fit) throw new Error('no fit');
    for (const key of ['xx', 'xy', 'yx', 'yy'] as const)
      expect(Math.abs(fit.transform[key] - transform[key])).toBeLessThan(tolerance.coefficient);
    for (const key of ['x0', 'y0'] as const)
      expect(Math.abs(fit.transform[key] - transform[key])).toBeLessThan(tolerance.metres);
    fit.residualsM.forEach((each, i) =>
      expect(Math.abs(each - (residualsM[i] ?? NaN))).toBeLessThan(tolerance.metres),
    );
    expect(Math.abs(fit.rmsM - rmsM)).toBeLessThan(tolerance.metres);
    if (sigmaM === null) expect(fit.sigmaM).toBeNull();
    else expect(Math.abs((fit.sigmaM ?? NaN) - sigmaM)).toBeLessThan(tolerance.metres);
  });

  test('gives the scale, turn and shift printed in Umeyama’s example', () => {
    const example = cases[0];
    if (!example) throw new Error('no example');
    const points = example.points.map(({ xPx, yPx, xM, yM }) => ({ xPx, yPx, at: { xM, yM } }));
    const t = pictureFit(points, 'similarity')?.transform;
    if (!t) throw new Error('no fit');
    const near = (got: number, wanted: number | undefined) =>
      expect(Math.abs(got - (wanted ?? NaN))).toBeLessThan(tolerance.printed);
    near(metresPerPixel(t), printed.c);
    near(t.xx / printed.c, printed.r[0]?.[0]);
    near(-t.xy / printed.c, printed.r[0]?.[1]); // pixels count down
    near(t.yx / printed.c, printed.r[1]?.[0]);
    near(t.x0, printed.t[0]);
    near(t.y0, printed.t[1]);
  });
});

/** Found again without noise: a known transform is its own truth. */
test('a picture laid down exactly is found again from any points that are not all in one place', () => {
  const coordinate = fc.double({ min: 0, max: 3000, noNaN: true });
  const pixels = fc.array(fc.record({ xPx: coordinate, yPx: coordinate }), { minLength: 2, maxLength: 8 });
  fc.assert(
    fc.property(
      pixels,
      fc.double({ min: 0.02, max: 1, noNaN: true }),
      fc.double({ min: -Math.PI, max: Math.PI, noNaN: true }),
      (points, scale, turn) => {
        const [a, b] = [scale * Math.cos(turn), scale * Math.sin(turn)];
        const truth: PictureTransform = { xx: a, xy: b, x0: 120, yx: b, yy: -a, y0: -340 };
        const spreadPx = Math.max(
          ...points.map((p) => Math.hypot(p.xPx - (points[0]?.xPx ?? 0), p.yPx - (points[0]?.yPx ?? 0))),
        );
        fc.pre(spreadPx > 10);
        const fit = pictureFit(
          points.map((point) => ({ ...point, at: onPlane(truth, point) })),
          'similarity',
        );
        expect(fit?.rmsM).toBeLessThan(1e-7);
        for (const key of ['xx', 'xy', 'yx', 'yy'] as const)
          expect(Math.abs((fit?.transform[key] ?? NaN) - truth[key])).toBeLessThan(1e-9);
      },
    ),
  );
});
