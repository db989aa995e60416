import { outlineAreaM2, type Outline } from '@mereward/shared/geometry/polygon';
import { fromPlane, type LonLat, type Point } from '@mereward/shared/geometry/plane';
import type { LakePolygon } from '@mereward/shared/lakes/contract';

/** The demo's waters lie at sea, well off any coast, so that nobody's real water is meant. */
const VALE: LonLat = [1.62, 53.6];

export type DemoWater = { centre: LonLat; outline: Outline; polygon: LakePolygon };

/** A smooth ring r(θ) = 1 + Σ a·cos(kθ + φ), stretched east–west, in no unit yet. Counter-clockwise. */
function ring(waves: readonly (readonly [k: number, a: number, phase: number])[], stretch: number): Point[] {
  return Array.from({ length: 140 }, (_, i) => {
    const theta = (2 * Math.PI * i) / 140;
    const r = waves.reduce((sum, [k, a, phase]) => sum + a * Math.cos(k * theta + phase), 1);
    return { xM: r * Math.cos(theta) * stretch, yM: (r * Math.sin(theta)) / stretch };
  });
}

const scaled = (points: Point[], by: number): Point[] =>
  points.map((p) => ({ xM: p.xM * by, yM: p.yM * by }));

/** The shape grown until its water (islands taken off) has the stated area. */
function ofArea(shore: Point[], islands: Point[][], areaM2: number): Outline {
  const land = islands.reduce(
    (sum, island) => sum + outlineAreaM2({ shore: [...island].reverse(), islands: [] }),
    0,
  );
  const now = outlineAreaM2({ shore, islands: [] });
  return { shore: scaled(shore, Math.sqrt((areaM2 + land) / now)), islands };
}

function island(centre: Point, radiusM: number): Point[] {
  const turning = Array.from({ length: 24 }, (_, i) => {
    const theta = (-2 * Math.PI * i) / 24; // clockwise, as a hole's ring turns
    const r = radiusM * (1 + 0.15 * Math.cos(3 * theta + 1));
    return { xM: centre.xM + 1.3 * r * Math.cos(theta), yM: centre.yM + r * Math.sin(theta) };
  });
  return turning;
}

function water(centre: LonLat, outline: Outline): DemoWater {
  const ringOf = (points: Point[]) => {
    const places = points.map((p) => {
      const [lon, lat] = fromPlane(centre, p);
      return [Number(lon.toFixed(7)), Number(lat.toFixed(7))] as [number, number]; // 7 decimals: a centimetre
    });
    return [...places, places[0]!];
  };
  const polygon: LakePolygon = {
    type: 'Polygon',
    coordinates: [ringOf(outline.shore), ...outline.islands.map(ringOf)],
  };
  return { centre, outline, polygon };
}

const beside = (eastM: number, northM: number): LonLat => fromPlane(VALE, { xM: eastM, yM: northM });

/** Far Ostle: an old gravel working of 6.4 ha with one island. */
export const FAR_OSTLE = water(
  VALE,
  ofArea(
    ring(
      [
        [2, 0.06, 0.4],
        [3, 0.11, 1.1],
        [4, 0.05, 2.6],
        [5, 0.05, 0.2],
        [7, 0.02, 1.9],
      ],
      1.22,
    ),
    [island({ xM: 62, yM: 28 }, 14)],
    64_000,
  ),
);

/** Ostle Pool: 1.3 ha, silty and weedy. */
export const OSTLE_POOL = water(
  beside(420, -60),
  ofArea(
    ring(
      [
        [2, 0.1, 2.2],
        [3, 0.08, 0.3],
        [5, 0.03, 1.4],
      ],
      1.1,
    ),
    [],
    13_000,
  ),
);

/** Sedge Cut: half a hectare, long and narrow. */
export const SEDGE_CUT = water(
  beside(300, -260),
  ofArea(
    ring(
      [
        [2, 0.12, 0],
        [3, 0.03, 0.7],
      ],
      1.55,
    ),
    [],
    5_000,
  ),
);
