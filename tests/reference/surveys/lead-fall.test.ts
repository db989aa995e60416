/**
 * Source: fixtures/11_lead_fall.json, free fall of lead spheres by the drag balance (formulas from memory of textbooks,
 * computed there). A calibrated rate is the regression through the origin over falls of one to three seconds, so it must lie
 * below the terminal velocity (the lead starts from rest) and above the mean speed of the first second; a depth by it must
 * hold the true one within 1.96 of its own σ. How far off a foot a second is, is told in words and never plotted: common
 * practice, no published source.
 */
import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { calibrateLead, fallDepth, uncalibratedFallWords } from '@mereward/shared/surveys/lead-fall';
import { FOOT_M } from '@mereward/shared/units/length';

const { cases, rule_of_thumb } = z
  .object({
    cases: z.array(
      z.object({
        oz: z.number(),
        T_C: z.number(),
        Cd: z.number(),
        terminal_velocity_m_s: z.number(),
        depth_from_rest_m: z.record(z.string(), z.number()),
      }),
    ),
    rule_of_thumb: z.array(z.object({ count_s: z.number(), depth_m: z.number() })),
  })
  .parse(JSON.parse(readFileSync(new URL('../fixtures/11_lead_fall.json', import.meta.url), 'utf8')));

describe.each(cases)('a free $oz oz lead at $T_C °C, drag $Cd', (lead) => {
  const falls = [1, 2, 3].map((seconds) => ({
    seconds,
    depthM: lead.depth_from_rest_m[String(seconds)] ?? Number.NaN,
  }));
  const answer = calibrateLead(falls);
  if (!answer.ok) throw new Error(answer.reason);
  const { calibration } = answer;

  test('is calibrated between its first second’s speed and its terminal velocity', () => {
    expect(calibration.rateMPerS).toBeLessThan(lead.terminal_velocity_m_s);
    expect(calibration.rateMPerS).toBeGreaterThan(falls[0]?.depthM ?? Number.NaN);
  });

  test('tells each depth it was learnt on, and that of half a second, within its own error', () => {
    const half = { seconds: 0.5, depthM: lead.depth_from_rest_m['0.5'] ?? Number.NaN };
    for (const { seconds, depthM } of [half, ...falls]) {
      const told = fallDepth(seconds, calibration);
      expect(Math.abs(told.depthM - depthM)).toBeLessThan(1.96 * told.sigmaM);
    }
  });

  test('falls some seven times as fast as a foot a second, as the words say', () => {
    const times = lead.terminal_velocity_m_s / FOOT_M;
    expect(times).toBeGreaterThan(6.9);
    expect(times).toBeLessThan(10);
  });
});

test.each(rule_of_thumb)('$count_s s uncalibrated is told as about $depth_m m on a held line', (row) => {
  expect(uncalibratedFallWords(row.count_s)).toContain(`about ${row.depth_m.toFixed(1)} m on a held line`);
});
