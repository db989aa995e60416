import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { FOOT_M } from './length';
import { convertWraps, formatWraps, metresToWraps, readWraps, USUAL_SPACING_M, wrapsToMetres } from './wraps';

describe('counting wraps', () => {
  test('25 m on ten-foot sticks is 8 wraps and 0.616 m', () => {
    const { whole, remainderM } = metresToWraps(25, 10 * FOOT_M);
    expect(whole).toBe(8);
    expect(remainderM).toBeCloseTo(0.616, 12);
    expect(formatWraps({ whole, remainderM }, 'm', 10 * FOOT_M)).toBe('8 + 0.62 m');
  });

  test('a length and its count turn into one another on any sticks', () => {
    const metres = fc.double({ min: 0, max: 250, noNaN: true });
    const spacing = fc.double({ min: 0.3, max: 10, noNaN: true });
    fc.assert(
      fc.property(metres, spacing, (lengthM, spacingM) => {
        const wraps = metresToWraps(lengthM, spacingM);
        expect(wraps.remainderM).toBeGreaterThanOrEqual(0);
        expect(wraps.remainderM).toBeLessThan(spacingM);
        expect(Math.abs(wrapsToMetres(wraps, spacingM) - lengthM)).toBeLessThan(1e-8);
      }),
    );
  });

  test('ten exact wraps lose no wrap to floating point', () => {
    for (let whole = 1; whole <= 60; whole++) {
      expect(metresToWraps(whole * USUAL_SPACING_M, USUAL_SPACING_M)).toEqual({ whole, remainderM: 0 });
    }
  });

  test('counts convert from twelve-foot sticks to two-metre sticks', () => {
    const { whole, remainderM } = convertWraps({ whole: 14, remainderM: 0 }, USUAL_SPACING_M, 2);
    expect(whole).toBe(25);
    expect(remainderM).toBeCloseTo(1.2064, 10);
  });

  test('a spacing of nothing is misuse', () => {
    expect(() => metresToWraps(10, 0)).toThrow(RangeError);
  });
});

describe('reading a typed count', () => {
  const read = (text: string) => {
    const answer = readWraps(text, USUAL_SPACING_M);
    return answer.ok
      ? [answer.wraps.whole, Number(answer.wraps.remainderM.toFixed(4)), answer.remainderStated]
      : null;
  };

  test.each([
    ['14', 14, 0, false],
    ['14 wraps', 14, 0, false],
    ['14 and a bit', 14, 0, false],
    ['14 + 0', 14, 0, true],
    ['14 + 3 ft', 14, 0.9144, true],
    ['14+3ft 6in', 14, 1.0668, true],
    ['14 + 3\'6"', 14, 1.0668, true],
    ['14 wraps + 1.2 m', 14, 1.2, true],
    ['14 + 40cm', 14, 0.4, true],
    ['14 + 1,5 m', 14, 1.5, true],
    ['14½', 14, 1.8288, false],
    ['14 1/3', 14, 1.2192, false],
    ['14 + ⅓', 14, 1.2192, false],
    ['14.5', 14, 1.8288, false],
    ['25 m', 6, 3.0544, true],
    ['25 metres', 6, 3.0544, true],
  ])('%s', (text, whole, remainderM, stated) => {
    expect(read(text)).toEqual([whole, remainderM, stated]);
  });

  test.each([
    ['far', /not a count of wraps/],
    ['14 + 3', /needs a unit/],
    ['14 + 13 ft', /whole wrap or more/],
    ['', /not a count of wraps/],
  ])('%s is refused in words', (text, reason) => {
    const answer = readWraps(text, USUAL_SPACING_M);
    expect(answer.ok ? '' : answer.reason).toMatch(reason);
  });

  test('what is written reads back the same to the last inch', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 60 }), fc.integer({ min: 1, max: 143 }), (whole, inches) => {
        const wraps = { whole, remainderM: inches * 0.0254 };
        const answer = readWraps(formatWraps(wraps, 'ft', USUAL_SPACING_M), USUAL_SPACING_M);
        expect(answer.ok && Math.abs(answer.wraps.remainderM - wraps.remainderM)).toBeLessThan(1e-9);
        expect(answer.ok && answer.wraps.whole).toBe(whole);
      }),
    );
  });

  test('a remainder that rounds up to a stick becomes a whole wrap', () => {
    expect(formatWraps({ whole: 9, remainderM: 3.657 }, 'ft', USUAL_SPACING_M)).toBe('10');
  });
});
