import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { CameBack, Drag, Drop, Substrate, type CastObservation } from './contract';
import { disagreements, type Feels } from './bottom-agreement';
import { bottomCall, type ThrownLine } from './bottom-call';
import { bottomEvidence, USUAL_TABLES } from './bottom-evidence';
import { refineLikelihoods, type Confirmed } from './bottom-refinement';

const MARK = '6a1f0d52-3c1e-4f9e-9a54-0d6a3b6f7c03';
const NOTHING: Feels = { drop: null, drag: null, cameBack: null, smell: null };
const line = (lineOutM: number, drag: CastObservation['drag'] = null, offsetDeg = 0): ThrownLine => ({
  aim: { by: 'mark', markId: MARK, offsetDeg },
  drag,
  lineOutM,
});
const judge = (feels: Partial<Feels>, earlier: ThrownLine[] = []) => {
  const felt = { ...NOTHING, ...feels };
  return bottomEvidence(felt, { here: line(51.2, felt.drag), earlier });
};

const feelings: fc.Arbitrary<Feels> = fc.record({
  drop: fc.option(fc.constantFrom(...Drop.options)),
  drag: fc.option(fc.constantFrom(...Drag.options)),
  cameBack: fc.option(fc.subarray([...CameBack.options])),
  smell: fc.option(fc.constantFrom('none' as const, 'bad_eggs' as const)),
});

describe('likelihood tables', () => {
  test('every row sums to one and says where it comes from', () => {
    for (const table of [USUAL_TABLES.substrate, USUAL_TABLES.cover]) {
      expect(table.source).toBe('Common practice, no published source');
      expect(sum(Object.values(table.prior))).toBeCloseTo(1, 12);
      for (const rows of Object.values(table.of))
        for (const row of Object.values(rows)) expect(sum(Object.values(row))).toBeCloseTo(1, 12);
    }
  });
});

describe('two answers by probability', () => {
  test('shares are probabilities, whatever was felt', () => {
    fc.assert(
      fc.property(feelings, (feels) => {
        const { substrate, cover } = judge(feels);
        for (const shares of [substrate, cover]) {
          if (shares === null) continue;
          expect(sum(Object.values(shares))).toBeCloseTo(1, 9);
          for (const share of Object.values(shares)) expect(share).toBeGreaterThanOrEqual(0);
        }
      }),
    );
  });

  test('missing evidence casts no vote', () => {
    expect(judge({}).substrate).toBeNull();
    expect(judge({ drop: 'unsure', drag: 'unsure', cameBack: [] }).substrate).toBeNull();
    const felt = judge({ drag: 'fine_rattle' });
    expect(judge({ drag: 'fine_rattle', drop: 'unsure', cameBack: null })).toEqual(felt);
  });

  test('a firm knock alone can’t split gravel from clay, and says so', () => {
    for (const drop of ['sharp_crack', 'firm_thud'] as const) {
      const { substrate, words, bottom } = judge({ drop });
      expect(substrate?.gravel).toBeCloseTo(substrate?.clay ?? Number.NaN, 12);
      expect(words).toMatch(/can’t tell gravel from hard clay/);
      expect(bottom).toBe('unknown');
    }
  });

  test('a drag after the knock splits them', () => {
    const rattled = judge({ drop: 'sharp_crack', drag: 'fine_rattle' });
    const skimmed = judge({ drop: 'sharp_crack', drag: 'smooth_skim' });
    expect(rattled.substrate?.gravel ?? 0).toBeGreaterThan(5 * (rattled.substrate?.clay ?? 1));
    expect(skimmed.substrate?.clay ?? 0).toBeGreaterThan(5 * (skimmed.substrate?.gravel ?? 1));
    expect(rattled.words).not.toMatch(/can’t tell/);
  });

  test('naive Bayes by hand: gravel against sand on a thud and a hiss', () => {
    const { substrate } = judge({ drop: 'firm_thud', drag: 'fine_rattle' });
    const weights = {
      silt: 0.04 * 0.01,
      clay: 0.32 * 0.05,
      sand: 0.35 * 0.35,
      gravel: 0.32 * 0.6,
      stones: 0.3 * 0.12,
    };
    for (const name of Substrate.options) {
      expect(substrate?.[name]).toBeCloseTo(weights[name] / sum(Object.values(weights)), 12);
    }
  });
});

describe('calling the bottom', () => {
  const soft = { drop: 'soft_slow', drag: 'smooth_slow_heavy' } as const;
  test.each<[string, Partial<Feels>]>([
    ['gravel', { drop: 'sharp_crack', drag: 'fine_rattle', cameBack: ['none'] }],
    ['clay', { drop: 'sharp_crack', drag: 'smooth_skim', cameBack: ['grey_clay'] }],
    ['sand', { drop: 'firm_thud', drag: 'fine_rattle', cameBack: ['sand'] }],
    ['sand', { drop: 'dull', drag: 'smooth_skim', cameBack: ['sand'] }],
    ['silt_firm', { ...soft, cameBack: ['none'] }],
    ['silt_deep', { ...soft, cameBack: ['black_silt'] }],
    ['silt_deep', { ...soft, smell: 'bad_eggs' }],
    ['leaf', { ...soft, cameBack: ['leaves'] }],
    ['leaf', { drop: 'soft_slow', drag: 'stick_free_stick', cameBack: ['twig'] }],
    ['weed_low', { drop: 'stop_start', drag: 'stick_free_stick', cameBack: ['weed'] }],
    ['weed_thick', { drop: 'no_touch', drag: 'stick_free_stick', cameBack: ['weed'] }],
    ['weed_thick', { drop: 'stop_start', drag: 'spongy_pull', cameBack: ['weed'] }],
    ['shell', { drop: 'sharp_crack', drag: 'coarse_rattle', cameBack: ['shell'] }],
    ['gravel', { drop: 'sharp_crack', drag: 'coarse_rattle' }],
    ['unknown', { drop: 'firm_thud', drag: 'smooth_slow_heavy' }],
    ['unknown', { drag: 'smooth_slow_heavy' }],
    ['unknown', { drop: 'soft_slow' }],
    ['unknown', { drag: 'spongy_pull' }],
    ['unknown', {}],
    ['silt_deep', { drop: 'soft_slow', cameBack: ['black_silt'] }],
    ['silt_firm', { drop: 'dull', cameBack: ['black_silt'] }],
    ['weed_low', { cameBack: ['weed'] }],
  ])('%s from %j', (bottom, feels) => expect(judge(feels).bottom).toBe(bottom));

  test('a snag takes two solid stops at the same wraps over the same mark', () => {
    const stop = { ...NOTHING, drag: 'solid_stop' } as const;
    const here = line(51.2, 'solid_stop');
    const call = (earlier: ThrownLine[]) => bottomCall(stop, here, earlier).bottom;
    expect(call([])).toBe('unknown');
    expect(call([line(50.5, 'solid_stop')])).toBe('snag');
    expect(call([line(45, 'solid_stop')])).toBe('unknown');
    expect(call([line(51.2, 'solid_stop', 12)])).toBe('unknown');
    expect(call([line(51.2, 'spongy_pull')])).toBe('unknown');
    const compass = (bearingDeg: number) => ({
      aim: { by: 'compass', bearingDeg, method: 'compass_phone' } as const,
    });
    expect(call([{ ...here, ...compass(0) }])).toBe('unknown');
    const near = { ...here, ...compass(359) };
    expect(bottomCall(stop, { ...here, ...compass(1) }, [near]).bottom).toBe('snag');
  });
});

describe('feels that disagree', () => {
  test.each<[number, Partial<Feels>]>([
    [0, { drop: 'sharp_crack', drag: 'fine_rattle', cameBack: ['none'] }],
    [1, { drop: 'sharp_crack', drag: 'stick_free_stick', cameBack: ['none'] }],
    [1, { drop: 'soft_slow', drag: 'fine_rattle' }],
    [2, { drop: 'sharp_crack', drag: 'fine_rattle', cameBack: ['black_silt'] }],
    [3, { drop: 'soft_slow', drag: 'fine_rattle', cameBack: ['weed'] }],
    [0, { drop: 'soft_slow', drag: 'unsure', cameBack: null }],
  ])('%i pairs clash in %j', (count, feels) => {
    expect(disagreements({ ...NOTHING, ...feels })).toHaveLength(count);
    expect(judge(feels).askAgain).toBe(count > 0);
  });
});

describe('learning from confirmed spots', () => {
  const clean: Feels = { drop: 'sharp_crack', drag: 'fine_rattle', cameBack: ['none'], smell: 'none' };

  test('rows still sum to one, and what was met becomes likelier', () => {
    const usual = USUAL_TABLES.substrate;
    const refined = refineLikelihoods(
      usual,
      Array.from({ length: 30 }, (): Confirmed<Substrate> => ({ bottom: 'gravel', feels: clean })),
    );
    expect(sum(Object.values(refined.prior))).toBeCloseTo(1, 12);
    expect(sum(Object.values(refined.of.gravel.drag))).toBeCloseTo(1, 12);
    expect(refined.of.gravel.drag.fine_rattle).toBeCloseTo((20 * 0.6 + 30) / 50, 12);
    expect(refined.of.gravel.drop.sharp_crack).toBeGreaterThan(refined.of.clay.drop.sharp_crack);
    expect(refined.of.silt).toEqual(usual.of.silt);
    expect(refined.source).toMatch(/30 confirmed spots/);
  });

  test('unsure feels teach nothing', () => {
    const unsure: Feels = { drop: 'unsure', drag: null, cameBack: null, smell: null };
    const refined = refineLikelihoods(USUAL_TABLES.cover, [{ bottom: 'snag', feels: unsure }]);
    expect(refined.of.snag).toEqual(USUAL_TABLES.cover.of.snag);
  });

  test('a table worth no cast is misuse', () => {
    expect(() => refineLikelihoods(USUAL_TABLES.cover, [], 0)).toThrow(RangeError);
  });
});

function sum(values: readonly number[]): number {
  return values.reduce((total, value) => total + value, 0);
}
