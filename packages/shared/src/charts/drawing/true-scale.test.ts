import fc from 'fast-check';
import { expect, test } from 'vitest';
import { pointsPerM, ROUND_SCALES, trueScale } from './true-scale';
import { toPage } from './view';

const room = { widthPx: 1200, heightPx: 700, besidePx: 40, abovePx: 25, pxPerPoint: 5 / 3 };

test('a metre at 1:1000 is a millimetre of paper', () => {
  expect((pointsPerM(1000) * 25.4) / 72).toBeCloseTo(1, 12);
});

test('water of any size and place gets the largest round scale that holds it', () => {
  const side = fc.double({ min: 8, max: 4000, noNaN: true });
  const place = fc.double({ min: -3000, max: 3000, noNaN: true });
  fc.assert(
    fc.property(side, side, place, place, (acrossM, upM, xM, yM) => {
      const box = [xM, yM, xM + acrossM, yM, xM + acrossM, yM + upM, xM, yM + upM];
      const { scale, view } = trueScale([box], room);
      expect(ROUND_SCALES).toContain(scale);
      expect(view.pxPerM / room.pxPerPoint).toBeCloseTo(pointsPerM(scale), 9);
      for (let i = 0; i < box.length; i += 2) {
        const { x, y } = toPage(view, box[i]!, box[i + 1]!);
        expect(x).toBeGreaterThanOrEqual(room.besidePx - 0.01);
        expect(x).toBeLessThanOrEqual(room.widthPx - room.besidePx + 0.01);
        expect(y).toBeGreaterThanOrEqual(room.abovePx - 0.01);
        expect(y).toBeLessThanOrEqual(room.heightPx - room.abovePx + 0.01);
      }
      const larger = ROUND_SCALES[ROUND_SCALES.findIndex((each) => each === scale) - 1];
      if (larger === undefined) return;
      const tooLarge = pointsPerM(larger) * room.pxPerPoint;
      expect(acrossM * tooLarge > room.widthPx - 80 || upM * tooLarge > room.heightPx - 50).toBe(true);
    }),
  );
});
