import type { Step } from './page';
import type { GlyphsStep } from './to-svg';

/** How far past the page a point may lie before what is drawn there is let go, px: strokes and halos are wide. */
const MARGIN_PX = 12;

type Size = { widthPx: number; heightPx: number };

/**
 * The same acts in fewer letters, for a drawing that travels over one bar of signal: what lies off the page is let go,
 * places are given from one to the next, to a tenth of a px, and a pattern's glyph is said once for all its places,
 * which may stand half a px aside. What shows on the page stays where it was.
 */
export function slimSteps(steps: readonly Step[], size: Size): (Step | GlyphsStep)[] {
  return steps.flatMap((step): (Step | GlyphsStep)[] => {
    if (step.do !== 'path' && step.do !== 'clip') return [step];
    const glyphs = step.do === 'path' ? glyphsOf(step, size) : null;
    if (glyphs) return glyphs.d === '' ? [] : [glyphs];
    const d = slimPath(step.d, size);
    return d === '' && step.do === 'path' ? [] : [{ ...step, d }];
  });
}

const SET_DOWN = /^(-?[\d.]+ -?[\d.]+)(m.+)$/;

/** A pattern: nothing but one glyph set down at many places. Null when it is something else. */
function glyphsOf({ d, fill, stroke }: Extract<Step, { do: 'path' }>, size: Size): GlyphsStep | null {
  const places: Point[] = [];
  let glyph = '';
  for (const [, body = ''] of d.matchAll(SUBPATH)) {
    const [, place = '', own = ''] = SET_DOWN.exec(body) ?? [];
    if (own === '' || (glyph !== '' && own !== glyph)) return null;
    glyph = own;
    const [x = 0, y = 0] = pointsIn(place)[0] ?? [];
    const at: Point = [Math.round(x / 10) * 10, Math.round(y / 10) * 10];
    if (!beyond([at], size)) places.push(at);
  }
  const [first, ...others] = places;
  if (!first) return { do: 'glyphs', d: '', glyph, fill, stroke };
  const pieces = (others.length > 0 ? others : [first]).map((to) => ({ control: null, to }));
  return { do: 'glyphs', d: written(first, pieces, false), glyph: glyph.replace(/ -/g, '-'), fill, stroke };
}

type Point = readonly [number, number]; // tenths of a px, whole numbers
type Piece = { control: Point | null; to: Point };

const SUBPATH = /M([^M]*)/g;
const NUMBER = /-?\d+(?:\.\d+)?/g;

function slimPath(d: string, size: Size): string {
  let out = '';
  for (const [, body = ''] of d.matchAll(SUBPATH)) out += slimSubpath(body, size);
  return out;
}

/** One part of a path: a line or a curve of M, L, Q and Z. What goes on in relative px is left as it is. */
function slimSubpath(body: string, size: Size): string {
  if (/[a-z]/.test(body)) return `M${body}`;
  const closed = body.endsWith('Z');
  const pieces: Piece[] = [];
  const [start = '', ...rest] = body.replace(/Z$/, '').split(/(?=[LQ])/);
  const first = pointsIn(start)[0];
  if (!first) return '';
  for (const text of rest) {
    const points = pointsIn(text);
    if (text.startsWith('L')) for (const to of points) pieces.push({ control: null, to });
    else
      for (let i = 0; i + 1 < points.length; i += 2) pieces.push({ control: points[i]!, to: points[i + 1]! });
  }
  const kept = onPage(first, pieces, size);
  return isHidden(kept, closed) ? '' : written(first, kept, closed);
}

function pointsIn(text: string): Point[] {
  const values = (text.match(NUMBER) ?? []).map((value) => Math.round(Number(value) * 10));
  return Array.from({ length: Math.floor(values.length / 2) }, (_, i): Point => [
    values[2 * i]!,
    values[2 * i + 1]!,
  ]);
}

type Kept = Piece & { off: Edge | null };
type Edge = 'left' | 'right' | 'top' | 'bottom';

/** Pieces wholly beyond one edge of the page become one straight line there: nothing of them shows, filled or not. */
function onPage(first: Point, pieces: readonly Piece[], size: Size): Kept[] {
  const kept: Kept[] = [];
  let from = first;
  for (const { control, to } of pieces) {
    const off = beyond([from, ...(control ? [control] : []), to], size);
    const last = kept.at(-1);
    if (off && last?.off === off) kept[kept.length - 1] = { control: null, to, off };
    else kept.push({ control: off ? null : control, to, off });
    from = to;
  }
  return kept;
}

function beyond(points: readonly Point[], { widthPx, heightPx }: Size): Edge | null {
  const margin = MARGIN_PX * 10;
  if (points.every(([x]) => x < -margin)) return 'left';
  if (points.every(([x]) => x > widthPx * 10 + margin)) return 'right';
  if (points.every(([, y]) => y < -margin)) return 'top';
  return points.every(([, y]) => y > heightPx * 10 + margin) ? 'bottom' : null;
}

/** A closed line all of whose pieces run beyond several edges may have the whole page inside it. */
function isHidden(kept: readonly Kept[], closed: boolean): boolean {
  const edges = new Set(kept.map(({ off }) => off));
  return !edges.has(null) && (!closed || edges.size < 2);
}

function written(first: Point, pieces: readonly Piece[], closed: boolean): string {
  let out = `M${pair(first)}`;
  let from = first;
  let act = '';
  for (const { control, to } of pieces) {
    const next = control ? 'q' : 'l';
    const text = control ? joined(pair(less(control, from)), pair(less(to, from))) : pair(less(to, from));
    out += next === act && text.startsWith('-') ? text : next === act ? ` ${text}` : `${next}${text}`;
    act = next;
    from = to;
  }
  return closed ? `${out}z` : out;
}

const less = (to: Point, from: Point): Point => [to[0] - from[0], to[1] - from[1]];
const tenth = (value: number): string => String(value / 10).replace(/^(-?)0\./, '$1.');
const joined = (a: string, b: string): string => (b.startsWith('-') ? a + b : `${a} ${b}`);
const pair = ([x, y]: Point): string => joined(tenth(x), tenth(y));
