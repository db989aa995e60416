import { isHeavy } from './depth-marks';
import { isWellSurveyed, type Ground } from './ground';
import { text, type Line, type Mark } from './mark';
import type { Palette } from './palette';
import { bandAt, bandsOf, labelInkOn } from './tint';
import { toPage, type PagePoint, type View } from './view';
import { valueAt } from './water-raster';

const SIZE_PX = 12;
const EVERY_PX = 420; // of line, for a further label
const LEAST_LINE_PX = 110;
const STEP_PX = 22;
const STRAIGHT = 0.965; // chord over arc, at least
const LEAST_GAP_PX = 9; // to the next isobath

/** Places already taken by words, so that none stand on each other. */
export type Taken = { x: number; y: number; radiusPx: number }[];

export type LabelWords = (levelM: number) => string;

type Candidate = { at: PagePoint; xM: number; yM: number; turnDeg: number; straight: number };

/** Depth figures along the isobaths, upright, heavy lines first, none too near another. */
export function isobathLabels(
  ground: Ground,
  palette: Palette,
  { view, words, taken }: { view: View; words: LabelWords; taken: Taken },
): Mark[] {
  const { depth } = ground;
  if (!depth) return [];
  const bands = bandsOf(ground.levelsM, palette.ramp);
  const heavyFirst = [...ground.isobaths].sort(
    (a, b) => Number(isHeavy(b.levelM, ground.stepM)) - Number(isHeavy(a.levelM, ground.stepM)),
  );
  return heavyFirst.flatMap(({ levelM, lines }) => {
    const label = words(levelM);
    const { ink, halo } = labelInkOn(bandAt(bands, levelM + ground.stepM * 0.01).tint, palette);
    const widthPx = label.length * SIZE_PX * 0.5 + 6;
    const places = lines.flatMap((line) => placesAlong(line, { view, widthPx, ground, taken }));
    return places.map(({ xM, yM, turnDeg }) =>
      text({
        words: label,
        x: xM,
        y: yM,
        sizePx: SIZE_PX,
        bold: isHeavy(levelM, ground.stepM),
        turnDeg,
        colour: ink,
        halo,
      }),
    );
  });
}

type Along = { view: View; widthPx: number; ground: Ground; taken: Taken };

function placesAlong(line: Line, along: Along): Candidate[] {
  const points = onPage(line, along.view);
  const lengthPx = points.at(-1)?.run ?? 0;
  if (lengthPx < LEAST_LINE_PX) return [];
  const candidates: Candidate[] = [];
  for (let run = along.widthPx; run < lengthPx - along.widthPx; run += STEP_PX) {
    const candidate = candidateAt(points, run, along);
    if (candidate) candidates.push(candidate);
  }
  candidates.sort((a, b) => b.straight - a.straight || a.at.x - b.at.x);
  const wanted = Math.max(1, Math.round(lengthPx / EVERY_PX));
  const chosen: Candidate[] = [];
  for (const candidate of candidates) {
    if (chosen.length >= wanted) break;
    const own = chosen.every(
      ({ at }) => Math.hypot(at.x - candidate.at.x, at.y - candidate.at.y) > EVERY_PX / 2,
    );
    if (!own || !isFree(candidate.at, along)) continue;
    chosen.push(candidate);
    along.taken.push({ ...candidate.at, radiusPx: along.widthPx / 2 + 2 });
  }
  return chosen;
}

type RunPoint = PagePoint & { run: number; xM: number; yM: number };

function onPage(line: Line, view: View): RunPoint[] {
  const points: RunPoint[] = [];
  let run = 0;
  for (let i = 0; i + 1 < line.length; i += 2) {
    const [xM, yM] = [line[i]!, line[i + 1]!];
    const point = toPage(view, xM, yM);
    const before = points.at(-1);
    if (before) run += Math.hypot(point.x - before.x, point.y - before.y);
    points.push({ ...point, run, xM, yM });
  }
  return points;
}

function atRun(points: readonly RunPoint[], run: number): RunPoint {
  let low = 0;
  let high = points.length - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (points[middle]!.run <= run) low = middle;
    else high = middle;
  }
  const [a, b] = [points[low]!, points[high]!];
  const share = b.run > a.run ? (run - a.run) / (b.run - a.run) : 0;
  const between = (from: number, to: number) => from + (to - from) * share;
  return {
    x: between(a.x, b.x),
    y: between(a.y, b.y),
    xM: between(a.xM, b.xM),
    yM: between(a.yM, b.yM),
    run,
  };
}

function candidateAt(points: readonly RunPoint[], run: number, along: Along): Candidate | null {
  const from = atRun(points, run - along.widthPx / 2);
  const to = atRun(points, run + along.widthPx / 2);
  const straight = Math.hypot(to.x - from.x, to.y - from.y) / along.widthPx;
  if (straight < STRAIGHT) return null;
  const middle = atRun(points, run);
  if (!hasRoom(middle, along)) return null;
  const turn = (Math.atan2(to.y - from.y, to.x - from.x) * 180) / Math.PI;
  const turnDeg = turn > 90 ? turn - 180 : turn <= -90 ? turn + 180 : turn;
  return { at: { x: middle.x, y: middle.y }, xM: middle.xM, yM: middle.yM, turnDeg, straight };
}

/** Are the next isobaths far enough off, by the bed's slope here, and is the place on the page? */
function hasRoom(place: RunPoint, { view, ground }: Along): boolean {
  const { depth } = ground;
  if (!depth || place.x < 12 || place.y < 12) return false;
  if (place.x > view.widthPx - 12 || place.y > view.heightPx - 12) return false;
  if (!isWellSurveyed(ground, place)) return false;
  const reachM = depth.cellM;
  const across = valueAt(depth, place.xM + reachM, place.yM) - valueAt(depth, place.xM - reachM, place.yM);
  const up = valueAt(depth, place.xM, place.yM + reachM) - valueAt(depth, place.xM, place.yM - reachM);
  const slope = Math.hypot(across, up) / (2 * reachM);
  return slope > 0 && (ground.stepM / slope) * view.pxPerM >= LEAST_GAP_PX;
}

function isFree(at: PagePoint, { taken, widthPx }: Along): boolean {
  return taken.every((other) => Math.hypot(at.x - other.x, at.y - other.y) > other.radiusPx + widthPx / 2);
}
