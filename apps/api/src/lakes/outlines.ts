import { geodesicRing, openRing, type LonLat } from '@mereward/shared/geometry/geodesic';
import { outlineFromRings, outlineFromText } from '@mereward/shared/geometry/outline';
import { insideRing } from '@mereward/shared/geometry/polygon';
import type { OutlineFinding, OutlineRead, ReadOutline } from '@mereward/shared/lakes/contract';
import { readGpx } from './gpx';

/** Reads an outline from a file's text: GPX when it is XML, else GeoJSON. Nothing is kept. */
export function readOutline({ text }: Pick<ReadOutline, 'text'>): OutlineRead {
  if (/^\ufeff?\s*</.test(text)) return outlineFromGpx(text.replace(/^\ufeff/, ''));
  return told(outlineFromText(text));
}

const told = ({ outline, areaM2, findings }: OutlineRead): OutlineRead => ({
  outline,
  areaM2,
  findings: findings.map(({ kind, words, at }) => ({ kind, words, at })),
});

const say = (kind: OutlineFinding['kind'], words: string): OutlineFinding => ({ kind, words, at: null });
const hectares = (ring: readonly LonLat[]): string => `${(areaOf(ring) / 10_000).toFixed(2)} ha`;
const areaOf = (ring: readonly LonLat[]): number => Math.abs(geodesicRing(ring).areaM2);
const places = (line: readonly LonLat[]): number => new Set(line.map(([lon, lat]) => `${lon},${lat}`)).size;

/**
 * A walk round the water as an outline: of all track segments and routes the one with the largest area is the
 * shore, those inside it that come back to their own start are islands. Segments are never joined to each other.
 */
export function outlineFromGpx(text: string): OutlineRead {
  const { waypoints, segments, routes, findings } = readGpx(text);
  const refused = (words?: string): OutlineRead => ({
    outline: null,
    areaM2: null,
    findings: words === undefined ? findings : [...findings, say('refused', words)],
  });
  if (findings.some(({ kind }) => kind === 'refused')) return refused();
  const lines = [...segments, ...routes];
  const [shore, ...others] = lines.filter((line) => places(line) >= 3).sort((a, b) => areaOf(b) - areaOf(a));
  if (waypoints.length > 0)
    findings.push(say('noted', `Not part of an outline, so left out: ${waypoints.length} × waypoint.`));
  const short = lines.filter((line) => places(line) < 3).length;
  if (short > 0)
    findings.push(say('noted', `Left out: ${short} × track segment of fewer than three places.`));
  if (!shore)
    return refused(
      'There is no track or route round a water in the file. Walk round it, recording, and export that.',
    );
  const islands = others.filter((line) => comesBack(line) && liesInside(shore, line));
  if (islands.length > 0)
    findings.push(
      say('noted', `Read as islands, since they lie inside the shore: ${islands.map(hectares).join(', ')}.`),
    );
  const left = others.filter((line) => !islands.includes(line));
  if (left.length > 0)
    findings.push(
      say(
        'noted',
        `The longest way round (${hectares(shore)}) is the shore; other tracks are left out: ${left.length}.`,
      ),
    );
  const read = told(outlineFromRings([shore, ...islands]));
  return { ...read, findings: [...findings, ...read.findings] };
}

const comesBack = (line: readonly LonLat[]): boolean => openRing(line).length < line.length;

const liesInside = (shore: readonly LonLat[], line: readonly LonLat[]): boolean => {
  const flat = ([lon, lat]: LonLat) => ({ xM: lon, yM: lat }); // inside or not is the same in degrees here
  const ring = openRing(shore).map(flat);
  return line.every((place) => insideRing(ring, flat(place)));
};
