import type { Line } from './mark';
import type { PagePoint } from './view';

/** Maps a place of the marks' plane to the page. */
export type Place = (x: number, y: number) => PagePoint;

const figure = (px: number): string => String(Math.round(px * 10) / 10);
const spot = ({ x, y }: PagePoint): string => `${figure(x)} ${figure(y)}`;

/** SVG path text of one line on the page; empty when there is nothing to draw. */
export function pathText(line: Line, how: { place: Place; closed: boolean; curved: boolean }): string {
  const points = placed(line, how.place, how.closed);
  if (points.length < 2) return '';
  if (how.curved && points.length > 2) return how.closed ? roundRing(points) : roundLine(points);
  return `M${points.map(spot).join('L')}${how.closed ? 'Z' : ''}`;
}

function placed(line: Line, place: Place, closed: boolean): PagePoint[] {
  const points: PagePoint[] = [];
  for (let i = 0; i + 1 < line.length; i += 2) points.push(place(line[i]!, line[i + 1]!));
  const [first, last] = [points[0], points.at(-1)];
  const repeated = closed && points.length > 2 && first && last && first.x === last.x && first.y === last.y;
  return repeated ? points.slice(0, -1) : points;
}

const middle = (a: PagePoint, b: PagePoint): PagePoint => ({ x: (a.x + b.x) / 2, y: (a.y + b.y) / 2 });

/** Each corner becomes the control of a curve from one side's middle to the next. */
function roundRing(points: readonly PagePoint[]): string {
  const count = points.length;
  let out = `M${spot(middle(points[count - 1]!, points[0]!))}`;
  for (let i = 0; i < count; i++) {
    out += `Q${spot(points[i]!)} ${spot(middle(points[i]!, points[(i + 1) % count]!))}`;
  }
  return `${out}Z`;
}

function roundLine(points: readonly PagePoint[]): string {
  const last = points.length - 1;
  const first = points[0]!;
  const end = points[last]!;
  if (first.x === end.x && first.y === end.y) return roundRing(points.slice(0, -1));
  let out = `M${spot(first)}`;
  for (let i = 1; i < last; i++) {
    const onto = i === last - 1 ? end : middle(points[i]!, points[i + 1]!);
    out += `Q${spot(points[i]!)} ${spot(onto)}`;
  }
  return out;
}

/** SVG path text of a glyph set down at many places. */
export function glyphsText(at: Line, glyph: string, place: Place): string {
  let out = '';
  for (let i = 0; i + 1 < at.length; i += 2) out += `M${spot(place(at[i]!, at[i + 1]!))}${glyph}`;
  return out;
}

/** A line with points closer than `leastM` to the one kept before left out; its ends are always kept. */
export function thinned(line: Line, leastM: number): number[] {
  const out: number[] = [];
  const last = line.length - 2;
  for (let i = 0; i <= last; i += 2) {
    const apart = out.length
      ? Math.hypot(line[i]! - out[out.length - 2]!, line[i + 1]! - out[out.length - 1]!)
      : Infinity;
    if (apart >= leastM) out.push(line[i]!, line[i + 1]!);
    else if (i === last && out.length > 2) out.splice(-2, 2, line[i]!, line[i + 1]!);
  }
  return out;
}
