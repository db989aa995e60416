import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Step } from './page';
import { pathText } from './path-text';
import { slimSteps } from './slim-steps';

const size = { widthPx: 300, heightPx: 200 };
const path = (d: string): Step => ({ do: 'path', d, fill: '#000000', stroke: null });
const slim = (d: string): string => {
  const [step] = slimSteps([path(d)], size);
  return step?.do === 'path' ? step.d : '';
};

type Point = [number, number];

/** Points along a path of M, L, Q, l, q and Z, a curve by its own middle too; in px. Written for this test alone. */
function traced(d: string): Point[] {
  const out: Point[] = [];
  let at: Point = [0, 0];
  for (const [, act = '', text = ''] of d.matchAll(/([MLQlqZz])([^MLQlqZz]*)/g)) {
    const values = (text.match(/-?(?:\d+\.?\d*|\.\d+)/g) ?? []).map(Number);
    const step = act.toUpperCase() === 'Q' ? 4 : 2;
    for (let i = 0; i + step <= values.length; i += step) {
      const from = act === act.toLowerCase() ? at : [0, 0];
      const place = (j: number): Point => [from[0]! + values[i + j]!, from[1]! + values[i + j + 1]!];
      if (step === 4) {
        const [control, to] = [place(0), place(2)];
        const middle = (k: 0 | 1): number => 0.25 * at[k] + 0.5 * control[k] + 0.25 * to[k];
        out.push([middle(0), middle(1)], to);
        at = to;
      } else {
        at = place(0);
        out.push(at);
      }
    }
  }
  return out;
}

const isOn = ([x, y]: Point): boolean => x >= 0 && y >= 0 && x <= size.widthPx && y <= size.heightPx;

/** Does a point lie inside by the even-odd rule? Lines between the traced points. */
function isInside(ring: readonly Point[], [x, y]: Point): boolean {
  let inside = false;
  ring.forEach(([ax, ay], i) => {
    const [bx, by] = ring[(i + 1) % ring.length]!;
    if (ay > y !== by > y && x < ax + ((y - ay) * (bx - ax)) / (by - ay)) inside = !inside;
  });
  return inside;
}

const places = fc.array(fc.tuple(fc.integer({ min: -900, max: 1200 }), fc.integer({ min: -700, max: 900 })), {
  minLength: 3,
  maxLength: 40,
});
const drawn = (points: readonly Point[], how: { closed: boolean; curved: boolean }): string =>
  pathText(points.flat(), { place: (x, y) => ({ x, y }), ...how });

describe('a drawing slimmed for one bar of signal', () => {
  test('keeps every point that shows where it was, to a tenth of a px', () => {
    fc.assert(
      fc.property(places, fc.boolean(), (points, curved) => {
        const whole = traced(drawn(points, { closed: false, curved })).filter(isOn);
        const kept = traced(slim(drawn(points, { closed: false, curved })));
        for (const [x, y] of whole)
          expect(Math.min(...kept.map((other) => Math.hypot(other[0] - x, other[1] - y)))).toBeLessThan(0.15);
      }),
    );
  });

  test('fills the same places of the page, areas that hold the whole page too', () => {
    const spots = fc.tuple(fc.integer({ min: 0, max: 300 }), fc.integer({ min: 0, max: 200 }));
    fc.assert(
      fc.property(places, spots, (points, spot) => {
        const at: Point = [spot[0] + 0.37, spot[1] + 0.41]; // off every edge of whole px
        const d = drawn(points, { closed: true, curved: false });
        expect(isInside(traced(slim(d)), at)).toBe(isInside(traced(d), at));
      }),
    );
    const around = drawn(
      [
        [-500, -500],
        [900, -500],
        [900, 900],
        [-500, 900],
      ],
      { closed: true, curved: false },
    );
    expect(isInside(traced(slim(around)), [150, 100])).toBe(true);
  });

  test('lets go of what lies off the page', () => {
    expect(slim('M-50 20L-80 40L-60 90')).toBe('');
    expect(slim('M400 20m-3 0h6')).toBe('');
  });

  test('says a glyph once for all its places on the page', () => {
    const d = 'M400 20m-6.5 6.5l13 -13M20.4 30.6m-6.5 6.5l13 -13M40 20m-6.5 6.5l13 -13';
    expect(slimSteps([path(d)], size)).toEqual([
      { do: 'glyphs', d: 'M20 31l20-11', glyph: 'm-6.5 6.5l13-13', fill: '#000000', stroke: null },
    ]);
    expect(slimSteps([path('M20 31m-3 0h6')], size)).toMatchObject([{ do: 'glyphs', d: 'M20 31l0 0' }]);
  });

  test('leaves words alone', () => {
    const words: Step = {
      do: 'text',
      words: '2.5',
      x: 10,
      y: 10,
      sizePx: 13,
      bold: false,
      slanted: false,
      anchor: 'middle',
      turnDeg: 0,
      colour: '#000000',
      halo: null,
    };
    expect(slimSteps([words], size)).toEqual([words]);
  });
});
