import type { ChartView } from '@mereward/shared/charts/contract';
import { bottomOf, layersOf } from '@mereward/shared/charts/drawing/chart-part';
import type { BottomArea } from '@mereward/shared/charts/drawing/bottom-areas';
import { BOTTOM_GLYPHS } from '@mereward/shared/charts/drawing/bottom-glyphs';
import { geodesicAlong, type LonLat } from '@mereward/shared/geometry/geodesic';
import { outlineInPlane } from '@mereward/shared/geometry/outline';
import { outlineAreaM2 } from '@mereward/shared/geometry/polygon';
import { pointAlong, type Point } from '@mereward/shared/geometry/point';
import { polygonsOf, turnedByNesting } from '@mereward/shared/geometry/ring-polygons';
import { facingDeg } from '@mereward/shared/lakes/peg-rules';
import type { GaugeBoardDetails, LayerAudiences, PegDetails } from '@mereward/shared/lakes/contract';
import type { PegWater } from '@mereward/shared/lakes/peg-water-contract';
import {
  placing,
  pointOf,
  polygonsGeometry,
  positionsOf,
  rounded,
  type Feature,
  type FeatureCollection,
  type Geometry,
  type Place,
  type Position,
  type Properties,
} from './geojson-feature';
import { onTheWater } from './on-the-water';

export type Ellipse = { semiMajorM: number; semiMinorM: number; bearingDeg: number };
export type MapSpot = Point & { id: string; name: string; peg: string; usableRadiusM: number };

/** What stands on a lake's map beside its chart; each of it open to this reader. */
export type MapPlaces = {
  pegs: { id: string; details: PegDetails; reachM: number }[];
  boards: { id: string; details: GaugeBoardDetails }[];
  waters: readonly PegWater[];
  spots: readonly MapSpot[] | null; // null: not this reader's
  audiences: LayerAudiences;
  ellipses: ReadonlyMap<string, Ellipse>; // of casts, 95 %
};

/** A chart as RFC 7946 GeoJSON, made of what the reader's own view of it holds and of what stands on the lake's map. */
export function chartGeojson(view: ChartView, places: MapPlaces): FeatureCollection {
  const place = placing(view.origin);
  const features = [
    lakeFeature(view, place),
    ...pegFeatures(places),
    ...view.marks.map(({ id, code, name, xM, yM }): Feature => ({
      type: 'Feature',
      id,
      geometry: pointOf(place(xM, yM)),
      properties: { kind: 'marker', code, name },
    })),
    ...boardFeatures(places),
    ...placeFeatures(view, place),
    ...waterFeatures(places, place),
    ...spotFeatures(places, place),
    ...areaFeatures(view, places, place),
    ...contours(view, places, place),
    ...bottomPoints(view, places, place),
    ...soundings(view, places, place),
  ];
  return { type: 'FeatureCollection', features: features.map((each) => stated(each, view)) };
}

/** Every feature says which chart it is of, at what level and from which days, so that it may be parted from the rest. */
function stated(feature: Feature, view: ChartView): Feature {
  return {
    ...feature,
    properties: {
      ...feature.properties,
      chart: view.version,
      status: view.status,
      datum_m: view.datumM,
      surveyed_from: view.surveyedFrom,
      surveyed_to: view.surveyedTo,
    },
  };
}

const CAUTION =
  'Depths from the stated survey, below the stated datum. They change. Not for boating, wading, swimming or diving.';

function lakeFeature(view: ChartView, place: Place): Feature {
  const outline = outlineInPlane(view.origin, view.outline);
  const geometry = polygonsGeometry([outline], place) ?? pointOf(rounded(view.origin));
  const level = view.levelNow && { level_now_m: view.levelNow.levelM, level_read_at: view.levelNow.at };
  return {
    type: 'Feature',
    id: view.lakeId,
    geometry,
    properties: {
      kind: 'lake',
      name: view.lakeName,
      fishery: view.fisheryName,
      caution: CAUTION,
      age: view.age,
      ...level,
    },
  };
}

/** The peg at the water's edge, the marked place to stand, and the limits of its arc. */
function pegFeatures({ pegs }: MapPlaces): Feature[] {
  return pegs.flatMap(({ id, details, reachM }): Feature[] => {
    const { number, name, arcFromDeg, arcToDeg, status, originMark } = details;
    const stance = rounded(details.origin);
    const limit = (side: 'left' | 'right', bearingDeg: number): Feature => ({
      type: 'Feature',
      geometry: { type: 'LineString', coordinates: [stance, rounded(along(details, bearingDeg, reachM))] },
      properties: { kind: 'limit_line', peg: number, side, bearing_deg: bearingDeg, length_m: reachM },
    });
    return [
      {
        type: 'Feature',
        id,
        geometry: pointOf(rounded(details.position)),
        properties: { kind: 'peg', number, name, facing_deg: facing(details), status_of_peg: status },
      },
      {
        type: 'Feature',
        geometry: pointOf(stance),
        properties: { kind: 'origin', peg: number, mark: originMark },
      },
      limit('left', arcFromDeg),
      limit('right', arcToDeg),
    ];
  });
}

const facing = (details: PegDetails): number => Math.round(facingDeg(details));
const along = ({ origin }: PegDetails, bearingDeg: number, lengthM: number): LonLat =>
  geodesicAlong(origin, bearingDeg, lengthM);

const boardFeatures = ({ boards }: MapPlaces): Feature[] =>
  boards.map(({ id, details: { code, kind, position, isDatumBoard, unit } }) => ({
    type: 'Feature',
    id,
    geometry: pointOf(rounded(position)),
    properties: { kind: 'gauge', code, board: kind, unit, datum_board: isDatumBoard ? 'yes' : 'no' },
  }));

/** Parking, gates, throw lines and hazards as points; an overhead line as a line. */
const placeFeatures = ({ places = [] }: ChartView, place: Place): Feature[] =>
  places.flatMap(({ id, kind, name, note, audience, line }): Feature[] => {
    const positions = positionsOf(line, place);
    const [first] = positions;
    if (!first) return [];
    const geometry = kind === 'overhead_line' ? lineThrough(positions) : pointOf(first);
    return geometry
      ? [{ type: 'Feature', id, geometry, properties: { kind, name, note, visibility: audience } }]
      : [];
  });

const lineThrough = (coordinates: Position[]): Geometry | null =>
  coordinates.length > 1 ? { type: 'LineString', coordinates } : null;

function waterFeatures({ waters }: MapPlaces, place: Place): Feature[] {
  return waters.flatMap(({ number, areaM2, rings }): Feature[] => {
    const geometry = polygonsGeometry(polygonsOf(turnedByNesting(rings.map(pointsOf))), place);
    if (!geometry) return [];
    return [
      {
        type: 'Feature',
        geometry,
        properties: { kind: 'peg_water', peg: number, area_m2: Math.round(areaM2) },
      },
    ];
  });
}

function spotFeatures({ spots, audiences }: MapPlaces, place: Place): Feature[] {
  return (spots ?? []).flatMap(({ id, name, peg, usableRadiusM, ...middle }): Feature[] => {
    const shore = Array.from({ length: CORNERS }, (_, i) =>
      pointAlong(middle, (-360 * i) / CORNERS, usableRadiusM),
    );
    const geometry = polygonsGeometry([{ shore, islands: [] }], place);
    const properties = { kind: 'spot', name, peg, radius_m: usableRadiusM, visibility: audiences.spots };
    return geometry ? [{ type: 'Feature', id, geometry, properties }] : [];
  });
}

const CORNERS = 32;

const KINDS: Partial<Record<BottomArea['kind'], string>> = {
  snag: 'snag',
  low_weed: 'weed',
  tall_weed: 'weed',
};

/** The areas of each bottom, their edges as the chart draws them: half the cells round a place are of the kind, and the shore. */
function areaFeatures(view: ChartView, { audiences }: MapPlaces, place: Place): Feature[] {
  const water = outlineInPlane(view.origin, view.outline);
  return bottomOf(view, layersOf(view)).flatMap((area): Feature[] => {
    const polygons = onTheWater(polygonsOf(area.edges.map(pointsOf)), water);
    const geometry = polygonsGeometry(polygons, place);
    if (!geometry) return [];
    const areaM2 = polygons.reduce((sum, each) => sum + outlineAreaM2(each), 0);
    const properties: Properties = {
      kind: KINDS[area.kind] ?? 'bottom_area',
      bottom: area.kind,
      words: BOTTOM_GLYPHS[area.kind].words,
      abbreviation: BOTTOM_GLYPHS[area.kind].abbreviation,
      area_m2: Math.round(areaM2 * 10) / 10,
      visibility: audiences.bottom,
    };
    return [{ type: 'Feature', geometry, properties }];
  });
}

/** x, y, x, y … as an open ring. */
function pointsOf(line: ArrayLike<number>): Point[] {
  const points: Point[] = [];
  for (let i = 0; i + 1 < line.length; i += 2) points.push({ xM: line[i] ?? 0, yM: line[i + 1] ?? 0 });
  const [first, last] = [points[0], points.at(-1)];
  return first && last && points.length > 1 && first.xM === last.xM && first.yM === last.yM
    ? points.slice(0, -1)
    : points;
}

function contours({ isobaths }: ChartView, { audiences }: MapPlaces, place: Place): Feature[] {
  return (isobaths ?? []).flatMap(({ levelM, lines }): Feature[] => {
    const coordinates = lines.map((line) => positionsOf(line, place)).filter(({ length }) => length > 1);
    if (coordinates.length === 0) return [];
    return [
      {
        type: 'Feature',
        geometry: { type: 'MultiLineString', coordinates },
        properties: { kind: 'contour', depth_at_datum_m: levelM, visibility: audiences.depth },
      },
    ];
  });
}

/** Casts that read no depth: the same kind of feature, its depth null. */
const bottomPoints = ({ bottomPoints: felt }: ChartView, { audiences }: MapPlaces, place: Place): Feature[] =>
  (felt ?? []).map(({ id, xM, yM, bottom, grade }) => ({
    type: 'Feature',
    id,
    geometry: pointOf(place(xM, yM)),
    properties: {
      kind: 'cast',
      depth_at_datum_m: null,
      sigma_m: null,
      bottom,
      grade,
      visibility: audiences.bottom,
    },
  }));

function soundings(
  { soundings: seen }: ChartView,
  { audiences, ellipses }: MapPlaces,
  place: Place,
): Feature[] {
  return (seen ?? []).map(({ id, xM, yM, depthM, sigmaM, bottom, grade, ofLog }): Feature => {
    const ellipse = ellipses.get(id);
    const axes = ellipse && {
      ellipse_95_major_m: metres(ellipse.semiMajorM),
      ellipse_95_minor_m: metres(ellipse.semiMinorM),
      ellipse_bearing_deg: Math.round(ellipse.bearingDeg * 10) / 10,
    };
    return {
      type: 'Feature',
      id,
      geometry: pointOf(place(xM, yM)),
      properties: {
        kind: ofLog ? 'sounding' : 'cast',
        ...{ depth_at_datum_m: depthM, sigma_m: sigmaM, bottom, grade },
        ...axes,
        visibility: audiences.soundings,
      },
    };
  });
}

const metres = (lengthM: number): number => Math.round(lengthM * 100) / 100;
