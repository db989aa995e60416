import { describe, expect, test } from 'vitest';
import { buildChart } from './build-chart';
import type { ChartInput } from './build-chart';
import { readChart } from './chart-reading';
import { isSurveyed } from './grid';
import { sectionAlong } from './section';

/** A bowl of radius 40 m, nearly 3 m deep, an island of radius 5 m at its middle, cast on a lattice of 6 m. */
function depthAt(xM: number, yM: number): number {
  const rangeM = Math.hypot(xM, yM);
  return 3 * (1 - (rangeM / 40) ** 2) * (1 - Math.exp((5 - rangeM) / 6));
}
const ring = (radiusM: number, turn: 1 | -1) =>
  Array.from({ length: 48 }, (_, i) => {
    const angle = (turn * i * Math.PI) / 24;
    return { xM: radiusM * Math.cos(angle), yM: radiusM * Math.sin(angle) };
  });
const gravel = { silt: 0.05, clay: 0.05, sand: 0.05, gravel: 0.8, stones: 0.05 };
const silt = { silt: 0.8, clay: 0.05, sand: 0.05, gravel: 0.05, stones: 0.05 };

function bowl(): ChartInput {
  const soundings: ChartInput['soundings'] = [];
  for (let xM = -36; xM <= 36; xM += 6) {
    for (let yM = -36; yM <= 36; yM += 6) {
      const rangeM = Math.hypot(xM, yM);
      // Nothing is cast in the far south-west, where the chart has to stay empty.
      if (rangeM > 38 || rangeM < 7 || (xM < -5 && yM < -5)) continue;
      const wobbleM = 0.03 * Math.sin(7 * xM + 3 * yM);
      soundings.push({
        id: `cast ${xM} ${yM}`,
        xM,
        yM,
        depthM: depthAt(xM, yM) + wobbleM,
        sigmaM: 0.05,
        grade: (xM + yM) % 4 === 0 ? 'A' : 'B',
        substrate: xM > 0 ? gravel : silt,
        cover: null,
      });
    }
  }
  const outline = { shore: ring(40, 1), islands: [ring(5, -1)] };
  return { outline, soundings, contourStepM: 0.5, maxGapM: 8 };
}

const input = bowl();
const steps: [string, number][] = [];
const chart = buildChart(input, (step, share) => steps.push([step, share]));
const bytesOf = (built: typeof chart) =>
  JSON.stringify(built, (_, v: unknown) => (ArrayBuffer.isView(v) ? [...new Uint8Array(v.buffer)] : v));

describe('a chart of a bowl with an island', () => {
  test('its depths are within 15 cm of the bowl a little way from the island and the shore', () => {
    for (const [xM, yM] of [
      [20, 3],
      [-3, 22],
      [15, -15],
      [9, 17],
      [30, 3],
    ] as const) {
      expect(Math.abs(readChart(chart, { xM, yM }).depthM! - depthAt(xM, yM))).toBeLessThan(0.15);
    }
  });

  test('land, island and water nobody cast in are not surveyed', () => {
    for (const [xM, yM] of [
      [0, 0],
      [2, -2],
      [41, 0],
      [-20, -20],
      [-15, -15],
      [-27, -27],
    ] as const) {
      expect(readChart(chart, { xM, yM })).toMatchObject({ depthM: null, sigmaM: null });
    }
    expect(chart.figures.surveyedShare).toBeGreaterThan(0.7);
    expect(chart.figures.surveyedShare).toBeLessThan(0.95);
  });

  test('no surveyed cell is further from a cast than the gap', () => {
    const { columns, cellM, originM, values } = chart.depth;
    values.forEach((value, i) => {
      if (!isSurveyed(value)) return;
      const xM = originM.xM + (i % columns) * cellM;
      const yM = originM.yM + Math.floor(i / columns) * cellM;
      const nearestM = Math.min(...input.soundings.map((s) => Math.hypot(s.xM - xM, s.yM - yM)));
      expect(nearestM).toBeLessThanOrEqual(8);
    });
  });

  test('isobaths lie at their depth and stay off unsurveyed water', () => {
    expect(chart.isobaths.map((i) => i.levelM)).toEqual([0.5, 1, 1.5, 2]);
    for (const { levelM, lines } of chart.isobaths) {
      for (const line of lines) {
        for (let i = 0; i < line.length; i += 2) {
          const [xM, yM] = [line[i]!, line[i + 1]!];
          expect(xM < -12 && yM < -12).toBe(false);
          // Beside the island and the empty corner the bed is only half held by casts.
          if (Math.hypot(xM, yM) > 12 && Math.max(xM, yM) > 2)
            expect(Math.abs(depthAt(xM, yM) - levelM)).toBeLessThan(0.25);
        }
      }
    }
  });

  test('the bottom is told where it was felt and unknown elsewhere', () => {
    expect(readChart(chart, { xM: 20, yM: 3 }).bottom).toBe('gravel');
    expect(readChart(chart, { xM: -20, yM: 8 }).bottom).toBe('silt');
    expect(readChart(chart, { xM: -20, yM: -20 }).bottom).toBeNull();
    expect(readChart(chart, { xM: 20, yM: 3 }).substrate!.confidence).toBeGreaterThan(0.5);
  });

  test('a section from the bank runs down the bowl with a band round it and stops at the island', () => {
    const section = sectionAlong(chart, { xM: 42, yM: 0 }, { bearingDeg: 270, toM: 44 });
    expect(section[0]!.depthM).toBeNull();
    expect(section.at(-1)!.depthM).toBeNull();
    const told = section.filter((point) => point.depthM !== null);
    expect(told.length).toBeGreaterThan(50);
    for (const { depthM, shallowestM, deepestM, xM } of told) {
      expect(shallowestM!).toBeLessThanOrEqual(depthM!);
      expect(deepestM!).toBeGreaterThan(depthM!);
      if (xM > 12) expect(depthAt(xM, 0)).toBeLessThan(deepestM! + 0.1);
    }
  });

  test('progress rises from nought to one in words', () => {
    const shares = steps.map(([, share]) => share);
    expect(shares[0]).toBe(0);
    expect(shares.at(-1)).toBe(1);
    expect(shares).toEqual([...shares].sort((a, b) => a - b));
    expect(steps.every(([step]) => /^[A-Z][a-z ]+$/.test(step))).toBe(true);
  });

  test('the quality report holds every sounding and ten worst', () => {
    expect(chart.quality.soundings).toBe(input.soundings.length);
    expect(chart.quality.worst).toHaveLength(10);
    expect(chart.quality.models.length).toBeGreaterThanOrEqual(4);
    expect(chart.quality.rmseM).toBeLessThan(0.3);
    expect(chart.quality.words).toMatch(/variogram/);
  });
});

test('moving the lake moves the chart and changes no depth', () => {
  const by = { xM: 1240.5, yM: -380 }; // whole cells, so that the cells lie on the same water
  const moved = <P extends { xM: number; yM: number }>(p: P): P => ({
    ...p,
    xM: p.xM + by.xM,
    yM: p.yM + by.yM,
  });
  const there = buildChart(
    {
      ...input,
      outline: {
        shore: input.outline.shore.map(moved),
        islands: input.outline.islands.map((i) => i.map(moved)),
      },
      soundings: input.soundings.map(moved),
    },
    () => undefined,
  );
  expect(there.frame).toEqual({ ...chart.frame, originM: moved(chart.frame.originM) });
  there.depth.values.forEach((depth, i) => {
    const here = chart.depth.values[i]!;
    if (isSurveyed(depth) && isSurveyed(here)) expect(Math.abs(depth - here)).toBeLessThan(1e-4);
  });
  const surveyed = (built: typeof chart) => built.depth.values.filter(isSurveyed).length;
  expect(Math.abs(surveyed(there) - surveyed(chart))).toBeLessThan(10);
});

describe('what the soundings may do', () => {
  test('the order they come in changes no byte', () => {
    const turned = { ...input, soundings: [...input.soundings].reverse() };
    expect(bytesOf(buildChart(turned, () => undefined))).toBe(bytesOf(chart));
  });

  test('grade C is shown as a point and moves no contour; D is left out with its reason', () => {
    const odd = { ...input.soundings[0]!, xM: 21, yM: 4, depthM: 9 };
    const withOdd = {
      ...input,
      soundings: [
        ...input.soundings,
        { ...odd, id: 'c', grade: 'C' as const },
        { ...odd, id: 'd', grade: 'D' as const },
      ],
    };
    const built = buildChart(withOdd, () => undefined);
    expect(built.depth.values).toEqual(chart.depth.values);
    expect(built.points.map((p) => p.id)).toContain('c');
    expect(built.leftOut).toEqual([{ id: 'd', why: 'Graded D: kept for staff, not charted.' }]);
  });

  test('a cast outside the water is left out and it is told how far out it lies', () => {
    const outside = { ...input.soundings[0]!, id: 'out', xM: 46, yM: 0 };
    const built = buildChart({ ...input, soundings: [...input.soundings, outside] }, () => undefined);
    expect(built.leftOut).toEqual([
      { id: 'out', why: 'Its place is 6.0 m outside the outline of the water.' },
    ]);
    expect(built.depth.values).toEqual(chart.depth.values);
  });

  test('a slip of a metre and a half is flagged, not dropped', () => {
    const soundings = input.soundings.map((s) =>
      s.id === 'cast 18 12' ? { ...s, depthM: s.depthM + 1.5 } : s,
    );
    const built = buildChart({ ...input, soundings }, () => undefined);
    expect(built.quality.flagged).toContain('cast 18 12');
    const by = built.quality.flaggedBy.find(({ id }) => id === 'cast 18 12')!;
    expect(Math.abs(by.errorM)).toBeGreaterThan(1);
    expect(by.standardised).toBeGreaterThan(3);
    expect(built.quality.flaggedBy.map(({ id }) => id)).toEqual(built.quality.flagged);
    expect(built.quality.worst[0]!.id).toBe('cast 18 12');
    expect(built.quality.worst[0]!.errorM).toBeLessThan(-1);
    expect(built.points).toHaveLength(input.soundings.length);
  });

  test('a bed as flat as a floor is charted as one', () => {
    const soundings = input.soundings.map((s) => ({ ...s, depthM: 2 }));
    const built = buildChart({ ...input, soundings }, () => undefined);
    // The shore drops straight to the floor here, so the surface rings a little beside it.
    expect(Math.abs(readChart(built, { xM: 20, yM: 3 }).depthM! - 2)).toBeLessThan(0.2);
    expect(built.figures.surveyedShare).toBeGreaterThan(0.7);
  });

  test('casts on one spot are not enough places', () => {
    const soundings = input.soundings.map((s) => ({ ...s, xM: 20, yM: 3 }));
    expect(() => buildChart({ ...input, soundings }, () => undefined)).toThrow('lie at only 1 places');
  });

  test('too few casts, a sounding that is no number and too wide a gap are refused in words', () => {
    const build = (change: Partial<ChartInput>) => () => buildChart({ ...input, ...change }, () => undefined);
    expect(build({ soundings: input.soundings.slice(0, 5) })).toThrow('Only 5 casts of grade A or B');
    const broken = { ...input.soundings[0]!, depthM: Number.NaN };
    expect(build({ soundings: [...input.soundings.slice(1), broken] })).toThrow(broken.id);
    expect(build({ maxGapM: 20 })).toThrow('at most 15 m');
  });
});
