import { expect, test } from 'vitest';
import { extractParts, outlookView, type Extract } from './extract-parts';
import { toPage } from './view';

const extract: Extract = {
  originM: { xM: 5, yM: 7 },
  facingDeg: 120,
  shore: [[0, 0, 20, 0]],
  water: [[0, 0, 20, 0, 20, 20, 0, 20]],
  contourStepM: 0.5,
  grid: null,
  isobaths: [],
};
const ahead = (m: number) => ({
  xM: 5 + m * Math.sin((120 * Math.PI) / 180),
  yM: 7 + m * Math.cos((120 * Math.PI) / 180),
});

test('looking up the page the peg stands at the foot and its water above it', () => {
  const view = outlookView(
    extract,
    { towards: 'up', reachM: 50, behindPx: 60 },
    { widthPx: 400, heightPx: 360 },
  );
  const peg = toPage(view, 5, 7);
  expect(peg.x).toBeCloseTo(200, 6);
  expect(peg.y).toBeCloseTo(300, 6);
  const far = ahead(50);
  expect(toPage(view, far.xM, far.yM)).toMatchObject({ x: expect.closeTo(200, 6), y: expect.closeTo(0, 6) });
});

test('looking along the page the peg stands at the left', () => {
  const view = outlookView(
    extract,
    { towards: 'right', reachM: 50, behindPx: 40 },
    { widthPx: 440, heightPx: 400 },
  );
  const peg = toPage(view, 5, 7);
  expect(peg.x).toBeCloseTo(40, 6);
  expect(peg.y).toBeCloseTo(view.heightPx / 2, 6);
  const far = ahead(50);
  expect(toPage(view, far.xM, far.yM).x).toBeCloseTo(440, 6);
});

test('no more is shown than the extract holds across', () => {
  const view = outlookView(
    extract,
    { towards: 'up', reachM: 50, behindPx: 0 },
    { widthPx: 2000, heightPx: 100 },
  );
  expect(view.widthPx / view.pxPerM).toBeLessThanOrEqual(116);
});

test('an extract without a grid is drawn as shore and peg alone', () => {
  const parts = extractParts({ id: 'p', number: '7' }, extract);
  expect(parts.ground.depth).toBeNull();
  expect(parts.bottom).toEqual([]);
  expect(parts.ground.shore).toEqual(extract.shore);
  expect(parts.pegs[0]).toMatchObject({ number: '7', xM: 5, yM: 7, facingDeg: 120 });
});
