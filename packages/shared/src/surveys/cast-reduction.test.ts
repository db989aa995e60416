import { describe, expect, test } from 'vitest';
import { geodesicAlong, type LonLat } from '../geometry/geodesic';
import { pointAlong } from '../geometry/plane';
import { reduceCast } from './cast-reduction';
import type { CastSite } from './cast-site';
import type { CastObservation, Kit, Reduced } from './contract';

const STANCE: LonLat = [-1.1427, 52.3651];
const MARK_ID = '6a1f0d52-3c1e-4f9e-9a54-0d6a3b6f7c03';
const circle = (northM: number, radiusM: number, turn: 1 | -1) =>
  Array.from({ length: 90 }, (_, i) => pointAlong({ xM: 0, yM: northM }, -4 * turn * i, radiusM));

const kit: Kit = {
  stickSpacingM: 3.6576,
  stickMeasured: 'along_line',
  stickDiameterM: null,
  stickCheckedOn: '2027-04-03',
  wrapReference: 'lead_to_clip',
  rodLengthM: 3.6576,
  lineAlongRodM: 3,
  reelHeightM: 1.2,
  rodElevationDeg: 0,
  lineType: 'braid',
  stretchShare: 0,
  stretchSigmaShare: 0,
  wrapSigmaShare: 0.25,
  pullM: 0.3048,
  floatOffsetM: 0.25,
  leadG: 85,
  leadShape: 'smooth_ball',
  declinationDeg: 0,
};

const cast: CastObservation = {
  aim: { by: 'mark', markId: MARK_ID, offsetDeg: 0 },
  sidestepM: 0,
  wrapsWhole: 14,
  remainderM: 0,
  remainderStated: true,
  lineText: '14 + 0',
  rodElevationDeg: 0,
  drop: 'sharp_crack',
  dropCountS: null,
  drag: 'fine_rattle',
  dragLengthM: 0.8,
  cameBack: ['none'],
  smell: null,
  pulls: 8,
  pullsAgain: null,
  floatSight: 'good',
  flags: [],
  note: '',
};

const mark: NonNullable<CastSite['mark']> = {
  name: 'pump-house chimney',
  place: geodesicAlong(STANCE, 0, 148),
  sigmaM: 0.5,
  permanence: 'permanent',
  ofThisLake: true,
};

const gauge: NonNullable<CastSite['gauge']> = {
  startAt: '2027-04-03T08:05:00Z',
  startM: 0.62,
  endAt: '2027-04-03T10:40:00Z',
  endM: 0.62,
  datumM: 0.62,
  higherNumberHigherWater: true,
};

const site: CastSite = {
  origin: STANCE,
  outline: { shore: circle(80, 80, 1), islands: [circle(100, 12, -1)] },
  stance: { place: STANCE, sigmaM: 0.3, originMarked: true },
  mark,
  gauge,
  observedAt: '2027-04-03T09:20:00Z',
  lead: null,
  earlier: [],
};

type Changes = { cast?: Partial<CastObservation>; kit?: Partial<Kit>; site?: Partial<CastSite> };
const reduce = (changes: Changes): Reduced =>
  reduceCast({ ...cast, ...changes.cast }, { ...kit, ...changes.kit }, { ...site, ...changes.site });
const sounding = (changes: Changes) => {
  const reduced = reduce(changes);
  if (!reduced.ok) throw new Error(reduced.reason);
  return reduced.sounding;
};

describe('casts that can’t be reduced', () => {
  test.each<[string, Changes, RegExp]>([
    ['a line too short for the depth', { cast: { wrapsWhole: 1 } }, /too short.*at least 6\.74 m is needed/],
    ['no line out at all', { cast: { wrapsWhole: 0 } }, /too short/],
    ['a spot on an island', { cast: { wrapsWhole: 27 } }, /on an island, \d+\.\d m from its edge/],
    [
      'a spot past the far bank',
      { cast: { wrapsWhole: 46 } },
      /beyond the far bank: the line meets it at 160\.0 m/,
    ],
    [
      'a spot behind the peg',
      { cast: { aim: { by: 'compass', bearingDeg: 180, method: 'compass_phone' } } },
      /falls on land/,
    ],
    ['a depth past sixty metres', { cast: { pulls: 200 } }, /past the 60 m/],
    ['a mark that is not catalogued', { site: { mark: null } }, /not in the lake’s catalogue/],
    ['a mark of another lake', { site: { mark: { ...mark, ofThisLake: false } } }, /a mark of another lake/],
    [
      'a mark at the angler’s feet',
      { site: { mark: { ...mark, place: STANCE } } },
      /stands on the peg itself/,
    ],
    ['a pull that is no number', { kit: { pullM: Number.NaN } }, /not a number: pullM/],
    ['endless line', { cast: { remainderM: Infinity } }, /not a number: remainderM/],
    [
      'a stance that is nowhere',
      { site: { stance: { ...site.stance, place: [Number.NaN, 52] as const } } },
      /stance/,
    ],
    ['a time that is none', { site: { observedAt: 'teatime' } }, /time of the cast/],
  ])('%s', (_, changes, words) => {
    const reduced = reduce(changes);
    expect(reduced.ok ? '' : reduced.reason).toMatch(words);
    expect(reduced.ok ? '' : reduced.remedy).not.toBe('');
  });

  test('keep the steps that were done before the refusal', () => {
    expect(reduce({ cast: { wrapsWhole: 46 } }).steps.map(({ key }) => key)).toContain('range');
    expect(reduce({ site: { mark: null } }).steps.map(({ key }) => key)).toEqual(['float', 'wrap', 'line']);
  });
});

describe('the depth below datum', () => {
  test('is less by the water standing above datum', () => {
    const { depthAsReadM, depthM } = sounding({ site: { gauge: { ...gauge, startM: 0.82, endM: 0.82 } } });
    expect(depthAsReadM).toBeCloseTo(2.536, 9);
    expect(depthM).toBeCloseTo(2.336, 9);
  });

  test('is told as dry where a high water covered a bank', () => {
    const high = { ...gauge, startM: 4, endM: 4 };
    expect(sounding({ site: { gauge: high } }).warnings.join()).toMatch(/dry/);
  });

  test('isn’t there without a gauge, and the grade falls to D', () => {
    const answer = sounding({ site: { gauge: null } });
    expect(answer.depthM).toBeNull();
    expect(answer.depthAsReadM).toBeCloseTo(2.536, 9);
    expect(answer.grade).toBe('D');
  });

  test('is warned about, and no better than C, when the board was last read weeks ago', () => {
    const answer = sounding({ site: { observedAt: '2027-05-03T09:00:00Z' } });
    expect(answer.warnings.join()).toMatch(/30 days/);
    expect(answer.grade).toBe('C');
  });

  test('means two readings a pull apart, and drops two that are farther', () => {
    expect(sounding({ cast: { pullsAgain: 9 } }).depthAsReadM).toBeCloseTo(8 * 0.3048 + 0.25, 9);
    const apart = sounding({ cast: { pullsAgain: 10 } });
    expect(apart.depthAsReadM).toBeNull();
    expect(apart.warnings[0]).toMatch(/8 and 10 pulls, are more than a pull apart/);
    expect(apart.grade).toBe('C');
  });

  test('is never taken from an uncalibrated count, which is only told', () => {
    const counted = sounding({ cast: { pulls: null, dropCountS: 6 } });
    expect(counted.depthM).toBeNull();
    expect(counted.warnings.join()).toMatch(/not calibrated/);
    const lead = { rateMPerS: 1.2, rateSigmaMPerS: 0.03, scatterM: 0.25, spots: 5 };
    const calibrated = sounding({ cast: { pulls: null, dropCountS: 2 }, site: { lead } });
    expect(calibrated.depthM).toBeCloseTo(2.4, 9);
    expect(calibrated.grade).toBe('C');
  });
});

describe('the error of a cast', () => {
  test('grows with a bare count, a compass and a stance fixed by satellite', () => {
    const best = sounding({}).ellipse.semiMajorM;
    expect(sounding({ cast: { remainderStated: false } }).ellipse.semiMajorM).toBeGreaterThan(best);
    const compass = sounding({ cast: { aim: { by: 'compass', bearingDeg: 0, method: 'compass_phone' } } });
    expect(compass.ellipse.semiMajorM).toBeGreaterThan(
      2.4477 * compass.rangeM * Math.tan((5 * Math.PI) / 180),
    );
    expect(compass.ellipse.bearingDeg).toBeCloseTo(90, 3);
    expect(compass.grade).toBe('D');
    expect(sounding({ site: { stance: { ...site.stance, sigmaM: 3 } } }).grade).toBe('C');
  });

  test('of a bare count is a quarter of a wrap along the line', () => {
    const { covariance } = sounding({ cast: { remainderStated: false } });
    const alongM = Math.sqrt(covariance.yy - 0.3 ** 2);
    expect(alongM).toBeGreaterThan(3.6576 / 4);
    expect(alongM).toBeLessThan(3.6576 / 4 + 0.05);
  });

  test('carries the stretch of nylon, and its uncertainty', () => {
    const nylon = { lineType: 'mono', stretchShare: 0.05, stretchSigmaShare: 0.02 } as const;
    const stretched = sounding({ kit: nylon });
    expect(stretched.lineOutM).toBeCloseTo(51.2064 * 1.05, 9);
    expect(stretched.covariance.yy).toBeGreaterThan((51.2064 * 0.02) ** 2);
    expect(stretched.grade).toBe('B');
    expect(sounding({ kit: { ...nylon, lineType: 'braid' } }).lineOutM).toBeCloseTo(51.2064, 9);
  });

  test.each([
    ['crosswind', 'C'],
    ['slack_line', 'C'],
    ['hit_another_line', 'C'],
    ['boat', 'A'],
  ] as const)('with %s is graded %s', (flag, grade) => {
    expect(sounding({ cast: { flags: [flag] } }).grade).toBe(grade);
  });

  test.each<[string, Changes, string, RegExp]>([
    [
      'no marked origin',
      { site: { stance: { ...site.stance, originMarked: false } } },
      'B',
      /no marked origin/,
    ],
    ['a tree for a mark', { site: { mark: { ...mark, permanence: 'tree' as const } } }, 'B', /not permanent/],
    ['a float seen poorly', { cast: { floatSight: 'poor' as const } }, 'C', /seen poorly/],
  ])('%s is told among the reasons', (_, changes, grade, words) => {
    const answer = sounding(changes);
    expect(answer.grade).toBe(grade);
    expect(answer.gradeReasons.join('; ')).toMatch(words);
  });
});

describe('what else is said', () => {
  test('a line over land to water beyond is taken with a warning', () => {
    expect(sounding({ cast: { wrapsWhole: 34 } }).warnings.join()).toMatch(/crosses land/);
  });

  test('declination turns a compass bearing to true', () => {
    const aim = { by: 'compass', bearingDeg: 359, method: 'compass_sighting' } as const;
    expect(sounding({ cast: { aim }, kit: { declinationDeg: 2.5 } }).bearingDeg).toBeCloseTo(1.5, 12);
  });

  test('a second solid stop at the same wraps makes a snag', () => {
    const stopped: Partial<CastObservation> = { drag: 'solid_stop' };
    expect(sounding({ cast: stopped }).bottom).toBe('unknown');
    expect(sounding({ cast: stopped, site: { earlier: [{ ...cast, ...stopped }] } }).bottom).toBe('snag');
  });

  test('the observation is left as it was', () => {
    const before = structuredClone(cast);
    reduce({});
    expect(cast).toEqual(before);
  });
});
