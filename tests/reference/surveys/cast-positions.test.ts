/**
 * Sources: fixtures/01b_cast_reduction.json and 14_end_to_end.json. Positions by GeodSolve (GeographicLib 2.1.2); the
 * slant model is Pythagoras on line, tip height and depth. Tolerances are the fixtures' own: 1e-8° and 1 mm (01b),
 * 2 mm (14, whose outline and pegs are rounded to 1e-7°).
 */
import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { geodesicBetween, type LonLat } from '@mereward/shared/geometry/geodesic';
import { toPlane } from '@mereward/shared/geometry/plane';
import { castPosition } from '@mereward/shared/surveys/cast-position';
import { toMetres } from '@mereward/shared/units/length';
import { aCastSite, byCompass, MARK_ID } from '../../support/cast-sites';
import { aKit, anObservation } from '../../support/kit';

const read = (name: string): unknown =>
  JSON.parse(readFileSync(new URL(`../fixtures/${name}`, import.meta.url), 'utf8'));

type Thrown = {
  peg: LonLat;
  origin: LonLat;
  bearingDeg: number;
  wraps: number;
  spacingM: number;
  tipM: number;
  depthM: number;
};

/** A cast from the rod tip itself, so that only the fixture's own terms are in play. */
function thrown({ peg, origin, bearingDeg, wraps, spacingM, tipM, depthM }: Thrown) {
  const whole = Math.floor(wraps);
  const remainderM = (wraps - whole) * spacingM;
  const cast = anObservation(MARK_ID, { aim: byCompass(bearingDeg), wrapsWhole: whole, remainderM });
  const kit = aKit({
    stickSpacingM: spacingM,
    wrapReference: 'lead_to_rod_tip',
    lineAlongRodM: 0,
    reelHeightM: tipM,
  });
  const site = aCastSite({ origin, stance: { place: peg, sigmaM: 0.3, originMarked: true }, mark: null });
  const position = castPosition(cast, [kit, site], { depthM, sigmaM: 0.1 });
  if (!position.ok) throw new Error(position.reason);
  return position;
}

const Casts = z.object({
  cases: z.array(
    z.object({
      id: z.string(),
      peg_lat: z.number(),
      peg_lon: z.number(),
      bearing_true_deg: z.number(),
      wraps: z.number(),
      stick_spacing: z.number(),
      spacing_unit: z.enum(['ft', 'm']),
      rod_tip_height_above_water_m: z.number(),
      depth_m: z.number(),
      line_length_m: z.number(),
      horizontal_slant_corrected_m: z.number(),
      lat_no_slant: z.number(),
      lon_no_slant: z.number(),
      lat_slant: z.number(),
      lon_slant: z.number(),
    }),
  ),
});

describe('casts of the reference', () => {
  test.each(Casts.parse(read('01b_cast_reduction.json')).cases)('$id', (c) => {
    const peg: LonLat = [c.peg_lon, c.peg_lat];
    const base = {
      peg,
      origin: peg,
      bearingDeg: c.bearing_true_deg,
      wraps: c.wraps,
      spacingM: toMetres(c.stick_spacing, c.spacing_unit),
    };
    const slant = thrown({ ...base, tipM: c.rod_tip_height_above_water_m, depthM: c.depth_m });
    expect(Math.abs(slant.lineOutM - c.line_length_m)).toBeLessThanOrEqual(0.001);
    expect(Math.abs(slant.rangeM - c.horizontal_slant_corrected_m)).toBeLessThanOrEqual(0.001);
    expect(Math.abs(slant.place[0] - c.lon_slant)).toBeLessThanOrEqual(1e-8);
    expect(Math.abs(slant.place[1] - c.lat_slant)).toBeLessThanOrEqual(1e-8);
    const flat = thrown({ ...base, tipM: 0, depthM: 0 });
    expect(Math.abs(flat.place[0] - c.lon_no_slant)).toBeLessThanOrEqual(1e-8);
    expect(Math.abs(flat.place[1] - c.lat_no_slant)).toBeLessThanOrEqual(1e-8);
  });
});

const Lake = z.object({
  lat0: z.number(),
  lon0: z.number(),
  pegs: z.array(z.object({ peg: z.int(), lat: z.number(), lon: z.number() })),
  casts: z.array(
    z.object({
      peg: z.int(),
      bearing_true_deg: z.number(),
      wraps: z.number(),
      lat: z.number(),
      lon: z.number(),
      east_m: z.number(),
      north_m: z.number(),
    }),
  ),
});

describe('the 160 casts of the synthetic lake', () => {
  const lake = Lake.parse(read('14_end_to_end.json'));
  const origin: LonLat = [lake.lon0, lake.lat0];

  test('each lands within 2 mm of the reference, on the ellipsoid and in the lake’s plane', () => {
    expect(lake.casts).toHaveLength(160);
    for (const c of lake.casts) {
      const peg = lake.pegs.find(({ peg: number }) => number === c.peg);
      if (!peg) throw new Error(`No peg ${c.peg}`);
      const place: LonLat = [peg.lon, peg.lat];
      const common = { bearingDeg: c.bearing_true_deg, wraps: c.wraps, spacingM: 3.6576, tipM: 0, depthM: 0 };
      const landed = thrown({ peg: place, origin, ...common });
      expect(geodesicBetween(landed.place, [c.lon, c.lat]).distanceM).toBeLessThanOrEqual(0.002);
      expect(Math.hypot(landed.point.xM - c.east_m, landed.point.yM - c.north_m)).toBeLessThanOrEqual(0.002);
      expect(toPlane(origin, landed.place)).toEqual(landed.point);
    }
  });
});
