import type { LonLat } from '@mereward/shared/geometry/geodesic';
import type { OutlineFinding } from '@mereward/shared/lakes/contract';
import { XMLParser, XMLValidator } from 'fast-xml-parser';
import { z } from 'zod';

export type GpxPoint = { position: LonLat; name: string };
/** What a GPX file holds. Segments stay apart: where recording stopped, nobody walked in a straight line. */
export type GpxRead = {
  waypoints: GpxPoint[];
  segments: LonLat[][]; // of tracks
  routes: LonLat[][];
  findings: OutlineFinding[]; // with anything refused, nothing of the file may be used
};

const Point = z.looseObject({
  lat: z.string().optional(),
  lon: z.string().optional(),
  name: z.unknown().optional(),
});
type Point = z.infer<typeof Point>;
// An element without anything in it is read as an empty text.
const part = <S extends z.ZodType>(schema: S) => z.preprocess((value) => (value === '' ? {} : value), schema);
const Track = part(
  z.looseObject({ trkseg: z.array(part(z.looseObject({ trkpt: z.array(Point).default([]) }))).default([]) }),
);
const Route = part(z.looseObject({ rtept: z.array(Point).default([]) }));
const Gpx = z.looseObject({
  gpx: part(
    z.looseObject({
      version: z.string().optional(),
      creator: z.string().optional(),
      wpt: z.array(Point).default([]),
      trk: z.array(Track).default([]),
      rte: z.array(Route).default([]),
    }),
  ),
});

/** A morning’s walk at a point a second is about ten thousand. */
const MOST_POINTS = 20_000;

/** No tag of a GPX file comes near; one of a hundred thousand attributes would hold up everybody for seconds. */
const LONGEST_TAG = /<[a-z_:][^<>]{4000}/i;

const LISTS = new Set(['wpt', 'trk', 'trkseg', 'trkpt', 'rte', 'rtept']);

const parser = new XMLParser({
  ignoreAttributes: false,
  attributeNamePrefix: '',
  parseTagValue: false,
  parseAttributeValue: false,
  removeNSPrefix: true,
  processEntities: false, // only names need them, and looking for them everywhere takes most of the time
  isArray: (name) => LISTS.has(name),
});

const NAMED: Record<string, string> = { amp: '&', lt: '<', gt: '>', quot: '"', apos: "'" };

/** The five entities that XML has by itself, and numbered characters. */
function unescaped(text: string): string {
  return text.replace(/&(#x[0-9a-f]{1,6}|#\d{1,7}|amp|lt|gt|quot|apos);/gi, (whole, name: string) => {
    if (!name.startsWith('#')) return NAMED[name] ?? whole;
    const code = /^#x/i.test(name) ? parseInt(name.slice(2), 16) : Number(name.slice(1));
    return code > 0 && code <= 0x10ffff ? String.fromCodePoint(code) : whole;
  });
}

const say = (kind: OutlineFinding['kind'], words: string): OutlineFinding => ({ kind, words, at: null });
const nothing = (words: string): GpxRead => ({
  waypoints: [],
  segments: [],
  routes: [],
  findings: [say('refused', words)],
});

/** Reads the text of a GPX 1.1 (or 1.0) file. Entities and document types are refused before anything is parsed. */
export function readGpx(text: string): GpxRead {
  if (/<!\s*(DOCTYPE|ENTITY)/i.test(text))
    return nothing(
      'The file declares a document type or entities, which a GPX file has no need of and which can be used to read other files. It was not opened; export it again.',
    );
  const points = text.match(/<(trk|rte|w)pt\b/g)?.length ?? 0;
  if (points > MOST_POINTS)
    return nothing(
      `The file holds ${points} points; at most ${MOST_POINTS} can be read. Record fewer, or simplify the track first.`,
    );
  if (LONGEST_TAG.test(text))
    return nothing('The file holds a tag of thousands of letters, which no GPX file does. Export it again.');
  const wellFormed = XMLValidator.validate(text);
  if (wellFormed !== true) {
    const { line, msg } = wellFormed.err;
    return nothing(`The file is not whole XML (line ${line}: ${msg}) or was cut short. Export it again.`);
  }
  const parsed = Gpx.safeParse(parsedXml(text));
  if (!parsed.success) return nothing('The file is XML but not GPX: it has no <gpx> element to read.');
  return contents(parsed.data.gpx);
}

function parsedXml(text: string): unknown {
  try {
    return parser.parse(text);
  } catch {
    return null; // names that no GPX file has
  }
}

function contents(gpx: z.infer<typeof Gpx>['gpx']): GpxRead {
  const findings = headFindings(gpx);
  const place = (point: Point): LonLat | null => position(point, findings);
  const places = (points: Point[]): LonLat[] => points.map(place).filter((at) => at !== null);
  const waypoints = gpx.wpt.flatMap((point) => {
    const at = place(point);
    return at ? [{ position: at, name: typeof point.name === 'string' ? unescaped(point.name) : '' }] : [];
  });
  const segments = gpx.trk.flatMap(({ trkseg }) => trkseg.map(({ trkpt }) => places(trkpt)));
  const routes = gpx.rte.map(({ rtept }) => places(rtept));
  return { waypoints, segments, routes, findings };
}

function headFindings({ version, creator }: { version?: string | undefined; creator?: string | undefined }) {
  const findings: OutlineFinding[] = [];
  if (version !== '1.1')
    findings.push(
      say('noted', `The file says it is GPX ${version ?? 'without a version'}; it is read as 1.1.`),
    );
  if (creator === undefined)
    findings.push(say('noted', 'The file does not say which program made it; it is read all the same.'));
  return findings;
}

/** Latitude and longitude as GPX 1.1 asks: decimal degrees, −90 ≤ lat ≤ 90, −180 ≤ lon < 180. */
function position({ lat, lon }: Point, findings: OutlineFinding[]): LonLat | null {
  const refuse = (words: string) => {
    if (!findings.some((finding) => finding.words === words)) findings.push(say('refused', words));
    return null;
  };
  if (lat === undefined || lon === undefined)
    return refuse('A point has no latitude or no longitude; export the file again.');
  const said = `latitude “${lat.slice(0, 20)}”, longitude “${lon.slice(0, 20)}”`;
  if (lat.includes(',') || lon.includes(','))
    return refuse(`A point has ${said}: GPX writes decimals with a point, not a comma.`);
  const decimal = /^\s*[+-]?(\d+\.?\d*|\.\d+)\s*$/;
  if (!decimal.test(lat) || !decimal.test(lon)) return refuse(`A point has ${said}, which are not numbers.`);
  const place: LonLat = [Number(lon), Number(lat)];
  if (Math.abs(place[1]) > 90 || place[0] < -180 || place[0] >= 180)
    return refuse(
      `A point has ${said}, which is not on Earth as GPX counts it (−90 to 90, −180 to below 180).`,
    );
  return place;
}
