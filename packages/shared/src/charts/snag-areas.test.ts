import { describe, expect, test } from 'vitest';
import { Cover, type CoverShares } from '../surveys/contract';
import { bottomLayers, type FeltBottom } from './bottom-layers';
import { readChart } from './chart-reading';
import { bottomAreas } from './drawing/bottom-areas';
import { emptyGrid } from './grid';

const CLEAR: CoverShares = { clear: 0.9, low_weed: 0.03, tall_weed: 0.02, leaf_litter: 0.03, snag: 0.02 };
const SNAG: CoverShares = { clear: 0.13, low_weed: 0.08, tall_weed: 0.12, leaf_litter: 0.06, snag: 0.61 };
const felt = (id: string, place: { xM: number; yM: number }, cover: CoverShares | null): FeltBottom => ({
  ...place,
  id,
  grade: 'B',
  substrate: null,
  cover,
  spread: { xx: 0.6, xy: 0, yy: 0.2 },
});
/** Clear casts two metres apart all round 11, 11, and one cast there. */
const casts = (cover: CoverShares | null): FeltBottom[] => [
  ...Array.from({ length: 100 }, (_, i) =>
    felt(`c${i}`, { xM: 2 + 2 * (i % 10), yM: 2 + 2 * Math.floor(i / 10) }, CLEAR),
  ),
  felt('s', { xM: 11, yM: 11 }, cover),
];
const frameOf = (cellM: number) => {
  const side = Math.round(22 / cellM) + 1;
  return { columns: side, rows: side, cellM, originM: { xM: 0, yM: 0 } };
};
function layersAt(cellM: number, evidence: readonly FeltBottom[]) {
  const frame = frameOf(cellM);
  const nodes = { frame, nodes: Int32Array.from({ length: frame.columns * frame.rows }, (_, i) => i) };
  const { substrate, cover } = bottomLayers(evidence, nodes);
  return { depth: emptyGrid(frame), sigma: emptyGrid(frame), substrate, cover };
}

describe.each([0.5, 1, 2, 5])('on cells of %d m', (cellM) => {
  test('a lone snag among a hundred clear casts stays a snag where it was felt', () => {
    const chart = layersAt(cellM, casts(SNAG));
    expect(readChart(chart, { xM: 11, yM: 11 }).cover).toEqual({ bottom: 'snag', confidence: 0.61 });
    expect(readChart(chart, { xM: 4, yM: 4 }).cover?.bottom).toBe('clear');
    expect(bottomAreas(null, chart.cover).map(({ kind, edges }) => [kind, edges.length])).toEqual([
      ['snag', 1],
    ]);
  });

  test('is gone once its evidence was ended', () => {
    const chart = layersAt(cellM, casts(null));
    expect(readChart(chart, { xM: 11, yM: 11 }).cover?.bottom).toBe('clear');
  });
});

test('its area is the 95 % ellipse of its place, and half a metre of its own', () => {
  const { cover } = layersAt(0.25, casts(SNAG));
  const cells = cover.classes.filter((code) => code === Cover.options.indexOf('snag')).length;
  const ellipseM2 = Math.PI * 5.991 * Math.sqrt((0.6 + 0.25) * (0.2 + 0.25));
  expect(Math.abs((cells * 0.25 ** 2) / ellipseM2 - 1)).toBeLessThan(0.03); // cells cut by its edge
});

test('a lead drawn into it spreads it along the line that was drawn', () => {
  const drawn = casts(SNAG).map((cast) => (cast.id === 's' ? { ...cast, track: { xM: 0, yM: -4 } } : cast));
  const chart = layersAt(0.5, drawn);
  expect(readChart(chart, { xM: 11, yM: 7 }).cover?.bottom).toBe('snag');
  expect(readChart(chart, { xM: 11, yM: 15 }).cover?.bottom).toBe('clear');
});

test('a cast that only might be a snag is weighed with the rest', () => {
  const maybe: CoverShares = { clear: 0.3, low_weed: 0.15, tall_weed: 0.1, leaf_litter: 0.1, snag: 0.35 };
  expect(readChart(layersAt(1, casts(maybe)), { xM: 11, yM: 11 }).cover?.bottom).toBe('clear');
});
