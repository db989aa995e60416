import { expect, test } from 'vitest';
import { palettes } from './palette';
import { placeMarks, type DrawnPlace } from './place-marks';
import type { View } from './view';

const palette = palettes.light;
const view: View = { widthPx: 400, heightPx: 300, pxPerM: 1, centre: { xM: 0, yM: 0 }, turnDeg: 0 };

test('what lies off the page is left out, and what lies on it has a sign of its own', () => {
  const place = (kind: DrawnPlace['kind'], x: number): DrawnPlace => ({ kind, name: 'It', line: [x, 0] });
  expect(placeMarks([place('parking', 500)], palette, view)).toEqual([]);
  const signs = (['parking', 'gate', 'throw_line', 'hazard'] as const).map((kind) => {
    const [first] = placeMarks([place(kind, 20)], palette, view);
    return first?.kind === 'glyphs' ? first.glyph : null;
  });
  expect(new Set(signs).size).toBe(4);
});

test('names are written only where there is room for them', () => {
  const gate: DrawnPlace = { kind: 'gate', name: 'Field gate', line: [0, 0] };
  const words = (pxPerM: number) =>
    placeMarks([gate], palette, { ...view, pxPerM }).flatMap((mark) =>
      mark.kind === 'text' ? [mark.words] : [],
    );
  expect(words(1)).toEqual([]);
  expect(words(3)).toEqual(['Field gate']);
});

test('an overhead line that runs off the page is cut at its edge and named on it', () => {
  const line: DrawnPlace = { kind: 'overhead_line', name: 'Wire', line: [-5000, 50, 5000, 50] };
  const marks = placeMarks([line], palette, { ...view, pxPerM: 2 });
  expect(placeMarks([line], palette, view).some(({ kind }) => kind === 'text')).toBe(false);
  expect(marks[0]?.kind).toBe('clip');
  const [name] = marks.flatMap((mark) => (mark.kind === 'text' ? [mark] : []));
  expect(name?.words).toBe('overhead line');
  expect(Math.abs(name?.x ?? Infinity)).toBeLessThanOrEqual(210);
});
