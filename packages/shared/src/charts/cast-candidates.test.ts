import { expect, test } from 'vitest';
import type { PegStance } from '../lakes/peg-waters';
import { windFor, type SpotKit } from '../surveys/same-spot';
import { castCandidates } from './cast-candidates';

const kit: SpotKit = {
  stickSpacingM: 3.6576,
  stickMeasured: 'along_line',
  stickDiameterM: null,
  wrapReference: 'lead_to_clip',
  lineAlongRodM: 3,
  reelHeightM: 1.2,
  rodElevationDeg: 0,
  lineType: 'braid',
  stretchShare: 0,
  stretchSigmaShare: 0,
};
const stance: PegStance = { at: { xM: 0, yM: 0 }, arcFromDeg: 330, arcToDeg: 30, reachM: 60 };
const everywhere = { isOwn: () => true, depthM: () => 2.4 };

test('candidates are whole wraps within the arc and the reach, each in the place that its count reaches', () => {
  const casts = castCandidates(stance, kit, everywhere);
  expect(casts.length).toBeGreaterThan(20);
  for (const { xM, yM, rangeM, bearingDeg, wrapsWhole, lineOutM } of casts) {
    expect(rangeM).toBeLessThanOrEqual(60);
    expect(bearingDeg >= 330 || bearingDeg <= 30).toBe(true);
    expect(Math.hypot(xM, yM)).toBeCloseTo(rangeM, 9);
    const wound = windFor(rangeM, kit, 2.4); // the exact inverse, which has a reference check of its own
    expect(wound.ok && Math.abs(wound.lineOutM - lineOutM) < 1e-9).toBe(true);
    expect(wrapsWhole % 2).toBe(0);
  }
});

test('what is another’s water is no candidate, and a wide arc is netted more coarsely', () => {
  expect(
    castCandidates(stance, kit, { ...everywhere, isOwn: (xM) => xM < 0 }).every(({ xM }) => xM < 0),
  ).toBe(true);
  const wide = castCandidates({ ...stance, arcFromDeg: 200, arcToDeg: 160, reachM: 120 }, kit, everywhere);
  expect(wide.length).toBeLessThanOrEqual(60);
});
