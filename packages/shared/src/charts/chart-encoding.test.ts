import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { UNKNOWN_CLASS } from './bottom-map';
import {
  decodeClasses,
  decodeDepth,
  decodeSigma,
  encodeClasses,
  encodeDepth,
  encodeSigma,
  fromBase64,
  toBase64,
} from './chart-encoding';

const frame = { columns: 3, rows: 1, cellM: 0.5, originM: { xM: -4, yM: 7.5 } };
const gridOf = (values: number[]) => ({ ...frame, values: Float64Array.from(values) });

describe('grids as bytes', () => {
  test('depths come back within half a centimetre, and unsurveyed stays unsurveyed', () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: -5, max: 60, noNaN: true }), { minLength: 2, maxLength: 2 }),
        (depths) => {
          const back = decodeDepth(encodeDepth(gridOf([...depths, Number.NaN])), frame);
          expect(back.values[2]).toBeNaN();
          depths.forEach((depth, i) => expect(Math.abs(back.values[i]! - depth)).toBeLessThan(0.00501));
          expect({ ...back, values: null }).toEqual({ ...frame, values: null });
        },
      ),
    );
  });

  test('σ is never understated and at most a step over', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 5.08, noNaN: true }), (sigma) => {
        const [back] = decodeSigma(encodeSigma(gridOf([sigma, Number.NaN, 9])), frame).values;
        expect(back).toBeGreaterThanOrEqual(sigma - 1e-9);
        expect(back! - sigma).toBeLessThan(0.02 + 1e-9);
      }),
    );
    expect([...decodeSigma(encodeSigma(gridOf([0.04, Number.NaN, 9])), frame).values]).toEqual([
      0.04,
      Number.NaN,
      5.08,
    ]);
  });

  test('classes come back, confidence rounded down to 1/250', () => {
    const classes = {
      ...frame,
      classes: Uint8Array.of(0, 4, UNKNOWN_CLASS),
      confidence: Float64Array.of(1, 0.4119, 0),
    };
    const back = decodeClasses(encodeClasses(classes), frame);
    expect([...back.classes]).toEqual([0, 4, 255]);
    expect([...back.confidence]).toEqual([1, 0.408, 0]);
  });

  test('encoding what was decoded gives the same bytes', () => {
    const depth = encodeDepth(gridOf([1.2345, Number.NaN, 3.3]));
    expect(encodeDepth(decodeDepth(depth, frame))).toEqual(depth);
    const sigma = encodeSigma(gridOf([0.123, Number.NaN, 3.3]));
    expect(encodeSigma(decodeSigma(sigma, frame))).toEqual(sigma);
  });

  test('bytes of the wrong length are refused in words', () => {
    expect(() => decodeDepth(new Uint8Array(5), frame)).toThrow('A layer of 3 × 1 cells is 6 bytes; 5 came.');
  });
});

describe('base64', () => {
  test('agrees with the platform’s own', () => {
    fc.assert(
      fc.property(fc.uint8Array({ maxLength: 40 }), (bytes) => {
        const text = toBase64(bytes);
        expect(text).toBe(Buffer.from(bytes).toString('base64'));
        expect(fromBase64(text)).toEqual(bytes);
      }),
    );
  });

  test('text that is not base64 is refused', () => {
    expect(() => fromBase64('ab!=')).toThrow('letter 3');
    expect(() => fromBase64('abc')).toThrow('multiple of four');
  });
});
