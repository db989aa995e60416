import { describe, expect, test } from 'vitest';
import { contrastOf, hexOf, luminanceOf, mixed } from './colour';
import { palettes } from './palette';
import { bandAt, bandsOf, glyphInkOn, labelInkOn, lineInkOn, tintAt } from './tint';

const shares = Array.from({ length: 101 }, (_, i) => i / 100);

test('OKLCH becomes the published sRGB of white, black and red', () => {
  expect(hexOf({ lightness: 1, chroma: 0, hueDeg: 0 })).toBe('#FFFFFF');
  expect(hexOf({ lightness: 0, chroma: 0, hueDeg: 0 })).toBe('#000000');
  expect(hexOf({ lightness: 0.62796, chroma: 0.25768, hueDeg: 29.234 })).toBe('#FF0000');
  expect(() => luminanceOf('straw')).toThrow(RangeError);
  expect(mixed('#000000', '#FFFFFF', 0.5)).toBe('#808080');
});

describe.each(['light', 'dusk', 'print'] as const)('the %s palette', (name) => {
  const palette = palettes[name];
  const tints = shares.map((t) => tintAt(t, palette.ramp));

  test('grows darker with every step of depth', () => {
    const light = tints.map(luminanceOf);
    light.slice(1).forEach((value, i) => expect(value).toBeLessThanOrEqual(light[i] ?? 0));
    expect(light[0]! - light[100]!).toBeGreaterThan(0.15);
    const bands = bandsOf([0.5, 1, 1.5, 2, 2.5, 3], palette.ramp).map(({ tint }) => luminanceOf(tint));
    bands.slice(1).forEach((value, i) => expect(value).toBeLessThan(bands[i] ?? 0));
  });

  test('carries figures at 4.5:1 on every tint', () => {
    for (const tint of tints) {
      const { ink, halo } = labelInkOn(tint, palette);
      expect(contrastOf(ink, halo)).toBeGreaterThanOrEqual(4.5);
    }
  });

  test('carries pattern glyphs at 3:1 on every tint', () => {
    for (const tint of tints) expect(contrastOf(glyphInkOn(tint, palette), tint)).toBeGreaterThanOrEqual(3);
  });

  test('never loses an isobath in its water', () => {
    for (const tint of tints) expect(contrastOf(lineInkOn(tint, palette), tint)).toBeGreaterThan(2);
  });

  test('shows pegs, casts and words at AA on its paper', () => {
    for (const colour of [palette.ink, palette.inkSoft, palette.danger]) {
      expect(contrastOf(colour, palette.paper)).toBeGreaterThanOrEqual(4.5);
    }
    expect(contrastOf(palette.selected, palette.paper)).toBeGreaterThanOrEqual(3);
    expect(contrastOf(palette.onSelected, palette.selected)).toBeGreaterThanOrEqual(4.5);
    expect(contrastOf(palette.waterLine, palette.paper)).toBeGreaterThanOrEqual(3);
  });
});

test('a band begins at its level and runs to the next', () => {
  const bands = bandsOf([1, 2], palettes.light.ramp);
  expect(bandAt(bands, -0.3).fromM).toBe(0);
  expect(bandAt(bands, 0.99).fromM).toBe(0);
  expect(bandAt(bands, 1).fromM).toBe(1);
  expect(bandAt(bands, 7).fromM).toBe(2);
});

test('a shallow lake stays pale: its deepest band is lighter than a deep lake’s', () => {
  const shallow = bandsOf([0.5, 1], palettes.light.ramp).at(-1);
  const deep = bandsOf([0.5, 1, 2, 3, 4], palettes.light.ramp).at(-1);
  expect(luminanceOf(shallow!.tint)).toBeGreaterThan(luminanceOf(deep!.tint));
});
