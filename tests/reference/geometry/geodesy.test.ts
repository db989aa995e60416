/**
 * Source: fixtures/01_geodesy.json, computed with GeodSolve, Planimeter and CartConvert of GeographicLib 2.1.2.
 * Tolerances are the fixture's own: positions 1e-8° and 1 mm, azimuth 0.001° beyond 20 m, area 1e-6 of itself.
 * The plane must agree with the geodesic within 5 mm up to 1 km (a metres-per-degree shortcut is centimetres off).
 */
import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import {
  bearingDifferenceDeg,
  geodesicAlong,
  geodesicAreaM2,
  geodesicBetween,
  geodesicRing,
} from '@mereward/shared/geometry/geodesic';
import {
  distanceBetweenM,
  fromPlane,
  planeBearingDeg,
  toPlane,
  type LonLat,
} from '@mereward/shared/geometry/plane';
import { outlineAreaM2, perimeterM } from '@mereward/shared/geometry/polygon';
import { outlineFromRings, outlineInPlane } from '@mereward/shared/geometry/outline';

const Place = z.tuple([z.number(), z.number()]);
const Fixture = z.object({
  direct: z.array(
    z.object({
      id: z.string(),
      lat1: z.number(),
      lon1: z.number(),
      azi1_deg: z.number(),
      s12_m: z.number(),
      lat2: z.number(),
      lon2: z.number(),
    }),
  ),
  inverse: z.array(
    z.object({
      id: z.string(),
      lat1: z.number(),
      lon1: z.number(),
      lat2: z.number(),
      lon2: z.number(),
      s12_m: z.number(),
      azi1_deg: z.number(),
    }),
  ),
  enu: z.array(
    z.object({
      id: z.string(),
      origin_lat: z.number(),
      origin_lon: z.number(),
      lat: z.number(),
      lon: z.number(),
      east_m: z.number(),
      north_m: z.number(),
    }),
  ),
  polygons: z.array(
    z.object({
      id: z.string(),
      rings: z.array(z.array(Place)),
      outer_area_signed_m2: z.number(),
      outer_perimeter_m: z.number(),
      water_area_m2: z.number(),
      shoreline_incl_islands_m: z.number(),
    }),
  ),
});

const { direct, inverse, enu, polygons } = Fixture.parse(
  JSON.parse(readFileSync(new URL('../fixtures/01_geodesy.json', import.meta.url), 'utf8')),
);

describe('geodesics', () => {
  test.each(direct)('$id goes to the reference place', ({ lat1, lon1, azi1_deg, s12_m, lat2, lon2 }) => {
    const [lon, lat] = geodesicAlong([lon1, lat1], azi1_deg, s12_m);
    expect(Math.abs(lat - lat2)).toBeLessThanOrEqual(1e-8);
    expect(Math.abs(bearingDifferenceDeg(lon2, lon))).toBeLessThanOrEqual(1e-8);
  });

  test.each(inverse)('$id measures the reference distance and azimuth', (c) => {
    const { distanceM, bearingDeg } = geodesicBetween([c.lon1, c.lat1], [c.lon2, c.lat2]);
    expect(Math.abs(distanceM - c.s12_m)).toBeLessThanOrEqual(0.001);
    if (c.s12_m > 20)
      expect(Math.abs(bearingDifferenceDeg(c.azi1_deg, bearingDeg))).toBeLessThanOrEqual(0.001);
  });
});

describe('the plane of a lake', () => {
  test.each(direct)('$id keeps length and true bearing from its origin, and comes back', (c) => {
    const origin: LonLat = [c.lon1, c.lat1];
    const point = toPlane(origin, [c.lon2, c.lat2]);
    expect(Math.abs(Math.hypot(point.xM, point.yM) - c.s12_m)).toBeLessThanOrEqual(0.001);
    const bearingDeg = planeBearingDeg({ xM: 0, yM: 0 }, point);
    if (c.s12_m > 20)
      expect(Math.abs(bearingDifferenceDeg(c.azi1_deg, bearingDeg))).toBeLessThanOrEqual(0.001);
    const [lon, lat] = fromPlane(origin, point);
    expect(Math.abs(lat - c.lat2)).toBeLessThanOrEqual(1e-8);
    expect(Math.abs(bearingDifferenceDeg(c.lon2, lon))).toBeLessThanOrEqual(1e-8);
  });

  test.each(inverse)('$id measures 5 mm true between two places off its origin', (c) => {
    const origin = geodesicAlong([c.lon1, c.lat1], 37, 600);
    const apartM = distanceBetweenM(toPlane(origin, [c.lon1, c.lat1]), toPlane(origin, [c.lon2, c.lat2]));
    expect(Math.abs(apartM - c.s12_m)).toBeLessThanOrEqual(0.005);
  });

  // East and north of a tangent plane differ from equidistant ones by s³/6R² and height effects: microns at 1 km.
  test.each(enu)('$id agrees with the local tangent plane within 5 mm', (c) => {
    const { xM, yM } = toPlane([c.origin_lon, c.origin_lat], [c.lon, c.lat]);
    expect(Math.hypot(xM - c.east_m, yM - c.north_m)).toBeLessThanOrEqual(0.005);
  });
});

describe('polygons', () => {
  test.each(polygons)('$id has the reference area and shoreline on the ellipsoid', (p) => {
    const outer = geodesicRing(p.rings[0] ?? []);
    expect(Math.abs(outer.areaM2 - p.outer_area_signed_m2)).toBeLessThanOrEqual(
      1e-6 * Math.abs(p.outer_area_signed_m2),
    );
    expect(Math.abs(outer.perimeterM - p.outer_perimeter_m)).toBeLessThanOrEqual(0.001);
    expect(Math.abs(geodesicAreaM2(p.rings) - p.water_area_m2)).toBeLessThanOrEqual(1e-6 * p.water_area_m2);
  });

  test.each(polygons)('$id read as an outline has the same area in its plane', (p) => {
    const { outline, areaM2 } = outlineFromRings(p.rings);
    expect(outline).not.toBeNull();
    if (!outline) return;
    expect(Math.abs((areaM2 ?? 0) - p.water_area_m2)).toBeLessThanOrEqual(1e-6 * p.water_area_m2);
    const plane = outlineInPlane(outline.coordinates[0]?.[0] ?? [0, 0], outline);
    expect(Math.abs(outlineAreaM2(plane) - p.water_area_m2)).toBeLessThanOrEqual(1e-6 * p.water_area_m2);
    expect(Math.abs(perimeterM(plane) - p.shoreline_incl_islands_m)).toBeLessThanOrEqual(0.005);
  });
});
