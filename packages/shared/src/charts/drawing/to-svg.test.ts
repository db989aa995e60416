import { expect, test } from 'vitest';
import { filled, ruled, stroked, text } from './mark';
import { stepsOf, type Page } from './page';
import { glyphsText, pathText, thinned } from './path-text';
import { PLAIN_SVG, toSvg } from './to-svg';

const place = (x: number, y: number) => ({ x, y });

test('a straight line and a closed ring become path text', () => {
  expect(pathText([0, 0, 10, 0], { place, closed: false, curved: false })).toBe('M0 0L10 0');
  expect(pathText([0, 0, 10, 0, 10, 10, 0, 0], { place, closed: true, curved: false })).toBe(
    'M0 0L10 0L10 10Z',
  );
});

test('a curved line keeps its ends; a ring that repeats its first point closes without a corner', () => {
  expect(pathText([0, 0, 10, 0, 10, 10], { place, closed: false, curved: true })).toBe('M0 0Q10 0 10 10');
  expect(pathText([0, 0, 4, 0, 4, 4, 0, 0], { place, closed: false, curved: true })).toMatch(/^M.*Z$/);
});

test('thinning keeps both ends and moves nothing', () => {
  expect(thinned([0, 0, 0.1, 0, 0.2, 0, 1, 0, 1.05, 0], 0.5)).toEqual([0, 0, 1.05, 0]);
  expect(thinned([0, 0, 1, 0, 2, 0], 0.5)).toEqual([0, 0, 1, 0, 2, 0]);
});

test('a glyph is set down at every place', () => {
  expect(glyphsText([1, 2, 3, 4], 'm-1 0h2', place)).toBe('M1 2m-1 0h2M3 4m-1 0h2');
});

const page: Page = {
  widthPx: 100,
  heightPx: 50,
  ground: '#FFFFFF',
  layers: [
    {
      view: { widthPx: 80, heightPx: 40, pxPerM: 1, centre: { xM: 0, yM: 0 }, turnDeg: 0 },
      atPx: { x: 10, y: 5 },
      marks: [
        { kind: 'clip', lines: [[0, 0, 5, 0, 5, 5]], marks: [filled([[0, 0, 5, 0, 5, 5]], '#112233')] },
        text({ words: 'Peg <7> & "8"', x: 0, y: 0, dyPx: 3, colour: '#000000', halo: '#FFFFFF' }),
      ],
    },
    { marks: [stroked([[0, 0, 9, 9]], ruled('#445566', 1.5, [2, 1]))] },
  ],
};

test('a map stands where its layer is put, cut off at its own edge', () => {
  const steps = stepsOf(page);
  expect(steps.map((step) => step.do)).toEqual([
    'path',
    'clip',
    'clip',
    'path',
    'unclip',
    'text',
    'unclip',
    'path',
  ]);
  expect(steps[5]).toMatchObject({ x: 50, y: 28, words: 'Peg <7> & "8"' });
});

test('the SVG names itself, escapes words and closes every group it opens', () => {
  const svg = toSvg(page, { ...PLAIN_SVG, title: 'Chart of A & B' });
  expect(svg).toContain('<title>Chart of A &amp; B</title>');
  expect(svg).toContain('Peg &lt;7&gt; &amp; &quot;8&quot;');
  expect(svg.match(/<g /g)).toHaveLength(2);
  expect(svg.match(/<\/g>/g)).toHaveLength(2);
  expect(svg).toContain('stroke-dasharray="2 1"');
  expect(svg).not.toContain('NaN');
});
