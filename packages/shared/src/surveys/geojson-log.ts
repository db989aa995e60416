import { z } from 'zod';
import type { LogOptions } from './log-contract';
import { DepthChoices, depthMeant } from './log-depth';
import { instantIn, unitInName } from './log-numbers';
import { refuseFile, UNIT_OF, type LogFaults, type LogRead } from './log-point';

/** A property's value is taken for a depth when it is a number; a third coordinate is offered, never guessed. */
const THIRD = 'third';
const propertyKey = (name: string): string => `property:${name}`;

const DEPTH_NAMES = new Set([
  'depth',
  'depth_m',
  'depth_ft',
  'water_depth',
  'water_depth_m',
  'sounding',
  'sounding_m',
]);
const TIME_NAMES = ['time', 'at', 'at_utc', 'timestamp', 'observed_at', 'datetime'];

const Item = z.looseObject({ type: z.string() });
const Geometry = z.looseObject({ type: z.string(), coordinates: z.unknown().optional() });
const Feature = z.looseObject({
  type: z.literal('Feature'),
  geometry: Geometry.nullable(),
  properties: z.record(z.string(), z.unknown()).nullish(),
});
type Feature = z.infer<typeof Feature>;

/** Longitude and latitude of WGS 84 by the names RFC 7946's forerunner gave them. */
const OURS = /(CRS:?84|EPSG:{1,2}4326|WGS\s?84)$/i;

const GEOMETRIES = new Set([
  'Point',
  'MultiPoint',
  'LineString',
  'MultiLineString',
  'Polygon',
  'MultiPolygon',
  'GeometryCollection',
]);

type Raw = { place: number[]; properties: Record<string, unknown>; file: number; at: number };

/** Soundings from the points of GeoJSON (RFC 7946). Other shapes hold none and are counted. */
export function readGeojsonLog(
  files: readonly { name: string; text: string }[],
  options: LogOptions,
  faults: LogFaults,
): LogRead {
  const choices = new DepthChoices();
  const cautions: string[] = [];
  const raws: Raw[] = [];
  const fileWords = files.map(({ name, text }, file) => {
    const found = new FileOfPoints(name, file, faults);
    const features = featuresOf(name, text, cautions);
    features.forEach((feature, i) => found.take(feature, i + 1));
    for (const { place, properties } of found.points) {
      if (place.length > 2) choices.add(THIRD);
      for (const [key, value] of Object.entries(properties))
        if (typeof value === 'number') choices.add(propertyKey(key));
    }
    for (const point of found.points) raws.push(point);
    return found.words(features.length);
  });
  const offered = choices.list((key) =>
    key === THIRD ? 'the third coordinate' : `the property “${key.slice(9)}”`,
  );
  const from = options.depthFrom ?? guessDepth(offered.map(({ key }) => key));
  const unit =
    options.depthUnit ?? (from === null || from === THIRD ? 'm' : (unitInName(from.slice(9)) ?? 'm'));
  const read: LogRead = {
    format: 'geojson',
    points: [],
    withoutPlace: 0,
    fileWords,
    joined: 'Each point is one sounding.',
    cautions,
    asks: askFor(from, raws.length, offered.length),
    depthChoices: offered,
    heading: [],
    guessed: { ...options, depthFrom: from, depthUnit: unit, positionSigmaM: options.positionSigmaM ?? 3 },
  };
  if (from === null) return read;
  for (const { place, properties, file, at } of raws) {
    const value = from === THIRD ? place[2] : properties[from.slice(9)];
    if (typeof value !== 'number') {
      const detail = `There is no number in ${from === THIRD ? 'the third coordinate' : `“${from.slice(9)}”`}. The point was left out.`;
      faults.add({ file: files[file]?.name ?? '', unit: UNIT_OF.geojson, at, value: shown(value), detail });
      continue;
    }
    const [lon = 0, lat = 0] = place;
    read.points.push({
      lon,
      lat,
      depthM: depthMeant(value, unit, options),
      atMs: timeOf(properties),
      file,
      at,
    });
  }
  return read;
}

const shown = (value: unknown): string =>
  (value === undefined ? '' : (JSON.stringify(value) ?? '')).slice(0, 120);

function askFor(from: string | null, points: number, offered: number): LogRead['asks'] {
  if (from !== null || points === 0) return [];
  return [
    {
      option: 'depthFrom',
      words:
        offered === 0
          ? 'The points have no numbers beside their places, so no depth: export them with one.'
          : 'Which number is the depth? Say it below.',
    },
  ];
}

function guessDepth(keys: readonly string[]): string | null {
  const named = keys.filter((key) => key !== THIRD && DEPTH_NAMES.has(key.slice(9).toLowerCase()));
  return named.length === 1 ? (named[0] ?? null) : null;
}

function timeOf(properties: Record<string, unknown>): number | null {
  for (const name of TIME_NAMES) {
    const value = properties[name];
    const at = typeof value === 'string' ? instantIn(value) : null;
    if (at) return at.ms;
  }
  return null;
}

function featuresOf(name: string, text: string, cautions: string[]): unknown[] {
  const root = Item.safeParse(parsed(name, text));
  if (!root.success) refuseFile(name, 'It is JSON but not GeoJSON: it has no “type”. Export it as GeoJSON.');
  refuseOtherFrame(name, root.data['crs'], cautions);
  const { type } = root.data;
  if (type === 'FeatureCollection') {
    const { features } = root.data;
    if (!Array.isArray(features))
      refuseFile(name, 'Its collection has no list of features. Export it again.');
    return features;
  }
  if (type === 'Feature') return [root.data];
  if (GEOMETRIES.has(type)) return [{ type: 'Feature', geometry: root.data, properties: null }];
  return refuseFile(
    name,
    `“${type.slice(0, 40)}” is no type of GeoJSON (they are case-sensitive). Export it again.`,
  );
}

function parsed(name: string, text: string): unknown {
  try {
    return JSON.parse(text);
  } catch (error) {
    const at = /position (\d+)/.exec(error instanceof Error ? error.message : '');
    const line = at ? text.slice(0, Number(at[1])).split('\n').length : null;
    const where = line === null ? '' : ` near line ${line}`;
    return refuseFile(name, `It is not whole JSON${where}, or was cut short. Export it again.`);
  }
}

function refuseOtherFrame(name: string, crs: unknown, cautions: string[]): void {
  if (crs === undefined || crs === null) return;
  const stated = z.looseObject({ properties: z.looseObject({ name: z.string() }) }).safeParse(crs);
  const named = stated.success ? stated.data.properties.name : shown(crs);
  if (!OURS.test(named))
    refuseFile(
      name,
      `It says its coordinates are in “${named.slice(0, 60)}”. Export it in WGS 84 longitude and latitude (EPSG:4326).`,
    );
  cautions.push(`${name} names its coordinates, WGS 84, in a way GeoJSON no longer does. They were read so.`);
}

/** The points of one file; what is wrong with a feature is told and the feature left out. */
class FileOfPoints {
  readonly points: Raw[] = [];
  private unlocated = 0;
  private shapes = 0;

  constructor(
    private readonly name: string,
    private readonly file: number,
    private readonly faults: LogFaults,
  ) {}

  take(item: unknown, at: number): void {
    const fault = (detail: string, value: unknown = item): void =>
      this.faults.add({ file: this.name, unit: UNIT_OF.geojson, at, value: shown(value), detail });
    const feature = Feature.safeParse(item);
    if (!feature.success) return fault('This is not a feature with a geometry. It was left out.');
    const { geometry } = feature.data;
    if (geometry === null) this.unlocated += 1;
    else if (!GEOMETRIES.has(geometry.type))
      fault(
        `“${geometry.type.slice(0, 40)}” is no shape of GeoJSON (they are case-sensitive). It was left out.`,
        geometry,
      );
    else if (geometry.type !== 'Point' && geometry.type !== 'MultiPoint') this.shapes += 1;
    else {
      const places = geometry.type === 'Point' ? [geometry.coordinates] : listOf(geometry.coordinates);
      for (const each of places) {
        const place = placeIn(each);
        if (typeof place === 'string') fault(place, each);
        else this.points.push({ place, properties: propertiesOf(feature.data), file: this.file, at });
      }
    }
  }

  words(features: number): string {
    const parts = [
      `GeoJSON, ${features} features: ${this.points.length} points`,
      this.unlocated > 0 ? `${this.unlocated} without a place` : '',
      this.shapes > 0 ? `${this.shapes} lines or areas, which hold no soundings` : '',
    ];
    return parts.filter((part) => part !== '').join(', ');
  }
}

const listOf = (value: unknown): unknown[] => (Array.isArray(value) ? value : [value]);
const propertiesOf = ({ properties }: Feature): Record<string, unknown> => properties ?? {};

function placeIn(value: unknown): number[] | string {
  if (!Array.isArray(value) || value.length < 2)
    return 'A place is at least a longitude and a latitude. It was left out.';
  const numbers = value
    .slice(0, 3)
    .filter((each): each is number => typeof each === 'number' && Number.isFinite(each));
  if (numbers.length < Math.min(3, value.length))
    return 'A coordinate is not a number. The point was left out.';
  const [lon = 0, lat = 0] = numbers;
  if (Math.abs(lat) > 90 || Math.abs(lon) > 180)
    return 'This is not on Earth: longitude comes first, then latitude, in degrees. The point was left out.';
  return numbers;
}
