/**
 * Source: the acceptance story of a surveyed peg, worked by hand there: depth 7.5 × 0.3048 + 0.25 = 2.536 m, line
 * 14 × 3.6576 = 51.206 m, ground range 51.06 ± 0.02 m read to the clip and 54.07 m read to the tip. The range table is
 * closed form for h = 1.2 m, d = 2.4 m, r = 3.0 m, printed to the centimetre, hence half a centimetre of tolerance.
 */
import { describe, expect, test } from 'vitest';
import { reduceCast } from '@mereward/shared/surveys/cast-reduction';
import type { CastObservation } from '@mereward/shared/surveys/contract';
import { groundRange } from '@mereward/shared/surveys/ground-range';
import { lineAWrapM } from '@mereward/shared/surveys/line-out';
import { aCastSite, MARK_ID, reasonOf, soundingOf } from '../../support/cast-sites';
import { aKit, anObservation } from '../../support/kit';

const reduced = (with_: Partial<CastObservation> = {}, kit = aKit()) =>
  reduceCast(anObservation(MARK_ID, with_), kit, aCastSite());

describe('cast 17, fourteen wraps over the pump-house chimney', () => {
  test('is 2.536 m deep, 51.206 m of line and 51.06 m of ground', () => {
    const sounding = soundingOf(reduced());
    expect(sounding.depthAsReadM).toBeCloseTo(2.536, 9);
    expect(sounding.depthM).toBeCloseTo(2.536, 9);
    expect(Math.abs(sounding.lineOutM - 51.2064)).toBeLessThan(1e-9);
    expect(Math.abs(sounding.rangeM - 51.06)).toBeLessThanOrEqual(0.02);
    expect(sounding.bearingDeg).toBe(0);
    expect(sounding.yM).toBeCloseTo(sounding.rangeM, 6);
  });

  test('lies at 54.07 m had the same wraps been read to the rod tip', () => {
    const { rangeM } = soundingOf(reduced({}, aKit({ wrapReference: 'lead_to_rod_tip' })));
    expect(Math.abs(rangeM - 54.07)).toBeLessThanOrEqual(0.02);
  });

  test('is gravel, grade A, and asks for no second cast', () => {
    const { bottom, grade, gradeReasons, askAgain, warnings } = soundingOf(reduced());
    expect({ bottom, grade, askAgain, warnings }).toEqual({
      bottom: 'gravel',
      grade: 'A',
      askAgain: false,
      warnings: [],
    });
    expect(gradeReasons).toHaveLength(1);
  });

  test('shows the pulls as counted beside the figure, in the order it was worked out', () => {
    const { steps } = reduced();
    expect(steps.map(({ key }) => key)).toEqual([
      'float',
      'wrap',
      'line',
      'bearing',
      'range',
      'spot',
      'datum',
      'yardstick',
    ]);
    expect(steps[0]?.inputs[0]).toEqual({ name: 'counted', value: '8 pulls' });
    expect(steps[0]).toMatchObject({ value: '2.536 m', sigma: '± 0.10 m' });
    expect(steps[2]).toMatchObject({ value: '51.206 m', sigma: '± 0.10 m' });
    expect(steps[7]?.value).toMatch(/within Special Order’s.*too little to claim any order/);
  });

  test('loses its A when the remainder was not measured and the float was read once', () => {
    expect(soundingOf(reduced({ remainderStated: false })).grade).toBe('B');
  });
});

describe('the other casts of the visit', () => {
  test('cast 22, soft and slow, heavy and smooth, black mud, is deep silt', () => {
    const felt = { drop: 'soft_slow', drag: 'smooth_slow_heavy', cameBack: ['black_silt'] } as const;
    const { bottom, askAgain } = soundingOf(
      reduced({ ...felt, cameBack: [...felt.cameBack], wrapsWhole: 17 }),
    );
    expect({ bottom, askAgain }).toEqual({ bottom: 'silt_deep', askAgain: false });
  });

  test('cast 23, a crack and a smooth skim with a clay smear, is clay and not gravel', () => {
    const { bottom, askAgain } = soundingOf(reduced({ drag: 'smooth_skim', cameBack: ['grey_clay'] }));
    expect({ bottom, askAgain }).toEqual({ bottom: 'clay', askAgain: false });
  });

  test('cast 30, a crack that sticks and frees with nothing back, is C at best and asks for another cast', () => {
    const sounding = soundingOf(reduced({ drag: 'stick_free_stick', cameBack: ['none'] }));
    expect(sounding.askAgain).toBe(true);
    expect(sounding.grade).toBe('C');
    expect(sounding.bottomWords).toMatch(/cast again 1–2 m away/);
  });

  test('a cast 6 m beyond the far bank is refused, saying so', () => {
    const reason = reasonOf(reduced({ wrapsWhole: 45, remainderM: 1.45 }));
    expect(reason).toMatch(
      /beyond the far bank: the line meets it at 160\.0 m and the spot lies 6\.\d m outside/,
    );
  });
});

describe('the table of ground ranges', () => {
  test.each([
    [4, [14.06, 13.05, 11.34, 10.13]],
    [8, [29.01, 28.36, 27.02, 25.95]],
    [10, [36.38, 35.78, 34.5, 33.45]],
    [14, [51.07, 50.53, 49.31, 48.28]],
    [18, [65.73, 65.23, 64.03, 63.01]],
    [22, [80.38, 79.9, 78.72, 77.71]],
  ])('%i wraps of twelve feet', (wraps, ranges) => {
    [0, 30, 60, 80].forEach((rodElevationDeg, i) => {
      const slope = { lineAlongRodM: 3, reelHeightM: 1.2, depthM: 2.4, rodElevationDeg };
      const toClip = groundRange(wraps * 3.6576, { ...slope, reference: 'lead_to_clip' });
      const toTip = groundRange(wraps * 3.6576 - 3, { ...slope, reference: 'lead_to_rod_tip' });
      expect(Math.abs((toClip.ok ? toClip.rangeM : Number.NaN) - (ranges[i] ?? 0))).toBeLessThanOrEqual(
        0.005,
      );
      expect(toTip).toEqual(toClip);
    });
  });

  test('sticks taped between centres take half a turn round a stick more: 0.26 m in 14 wraps', () => {
    const wrapM = lineAWrapM(aKit({ stickMeasured: 'centres' }));
    expect((wrapM - 3.6576) * 14).toBeCloseTo(0.264, 3);
    expect(lineAWrapM(aKit({ stickMeasured: 'along_line' }))).toBe(3.6576);
  });
});
