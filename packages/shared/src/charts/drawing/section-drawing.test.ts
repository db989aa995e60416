import { expect, test } from 'vitest';
import { palettes } from './palette';
import { stepsOf } from './page';
import { depthAt, drawSection, type SectionPlace } from './section-drawing';

const bed = (
  lineOutM: number,
  depthM: number | null,
  bottom: SectionPlace['bottom'] = 'silt',
): SectionPlace => ({
  lineOutM,
  depthM,
  sigmaM: depthM === null ? null : 0.1,
  bottom: depthM === null ? null : bottom,
});
const places = [
  bed(0, 0),
  bed(10, 1),
  bed(20, 2),
  bed(30, 3, 'gravel'),
  bed(40, 2, 'gravel'),
  bed(50, null),
  bed(60, null),
];
const page = { widthPx: 400, heightPx: 200, palette: palettes.light };
const input = { places, stickSpacingM: 3.6576, depthWords: (d: number) => d.toFixed(1), unitM: 1 };

test('the mark goes from the water down and ends on the bed', () => {
  const steps = stepsOf(drawSection({ ...input, markLineOutM: 20 }, page));
  const own = steps.filter(
    (step) => step.do === 'path' && (step.fill ?? step.stroke?.colour) === palettes.light.selected,
  );
  const [line, dot] = own.map((step) => (step.do === 'path' ? step.d : ''));
  const end = /L([\d.]+) ([\d.]+)$/.exec(line ?? '');
  expect(dot).toMatch(new RegExp(`^M${end?.[1]} ${end?.[2]}m`));
  const bedLine = steps.find((step) => step.do === 'path' && step.stroke?.widthPx === 2);
  expect(bedLine?.do === 'path' && bedLine.d).toContain(`${end?.[1]} ${end?.[2]}`);
});

test('no mark is drawn where nobody surveyed', () => {
  const steps = stepsOf(drawSection({ ...input, markLineOutM: 55 }, page));
  expect(steps.some((step) => step.do === 'path' && step.fill === palettes.light.selected)).toBe(false);
  expect(steps.some((step) => step.do === 'text' && step.words === 'not surveyed')).toBe(true);
});

test('wraps are counted along the top and bottoms are named below', () => {
  const words = stepsOf(drawSection({ ...input, markLineOutM: null }, page)).flatMap((step) =>
    step.do === 'text' ? [step.words] : [],
  );
  expect(words).toEqual(expect.arrayContaining(['4', '8', '12', '16', 'silt', 'gravel']));
});

test('depth between two places is on the straight line, and unknown in a gap or past the end', () => {
  expect(depthAt(places, 25)).toBeCloseTo(2.5, 9);
  expect(depthAt(places, 40)).toBe(2);
  expect(depthAt(places, 45)).toBeNull();
  expect(depthAt(places, 61)).toBeNull();
});

test('the bank the angler stands on is not called unsurveyed; a gap out on the water is', () => {
  const rules = (own: SectionPlace[]) =>
    stepsOf(drawSection({ ...input, places: own, markLineOutM: null }, page)).filter(
      (step) =>
        step.do === 'path' && step.stroke?.colour === palettes.light.rule && step.stroke.widthPx === 1,
    ).length;
  expect(rules([bed(0, null), bed(2, 0.1), bed(10, 1)])).toBe(0);
  expect(rules([bed(0, 0.1), bed(2, null), bed(10, 1)])).toBe(1);
});

test('depths are ruled at round figures of the reader’s own unit', () => {
  const ruled = (unitM: number) =>
    stepsOf(
      drawSection(
        {
          ...input,
          unitM,
          depthWords: (d) => String(Math.round((d / unitM) * 100) / 100),
          markLineOutM: null,
        },
        page,
      ),
    ).flatMap((step) => (step.do === 'text' && step.anchor === 'end' ? [step.words] : []));
  expect(ruled(1)).toEqual(['0', '1', '2', '3']);
  expect(ruled(0.3048)).toEqual(['0', '5', '10']);
});
