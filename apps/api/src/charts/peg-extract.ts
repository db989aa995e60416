import type { PegPageView } from '@mereward/shared/charts/contract';
import { outlineInPlane } from '@mereward/shared/geometry/outline';
import { toPlane, type Point } from '@mereward/shared/geometry/plane';
import { ringsOf } from '@mereward/shared/geometry/polygon';
import { facingDeg } from '@mereward/shared/lakes/peg-rules';
import { clipLine, thinLine, type Box } from '@mereward/shared/charts/line-thinning';
import { clipRing } from '@mereward/shared/charts/ring-clip';
import { layersOf } from './chart-layers';
import { extractGrid } from './extract-grid';
import type { PegGround } from './peg-chart';

const BEHIND_M = 12;
const BESIDE_M = 60;
/** How many numbers the extract may hold: the page is read on a bank with one bar of signal. */
const MOST_NUMBERS = 3200;
const FINEST_M = 0.15;

/** The piece of chart in front of a peg: shore, and isobaths when this reader may see depths. */
export function pegExtract({ peg, lake, chart, origin, sight }: PegGround): PegPageView['extract'] {
  if (!chart) return null;
  const originM = toPlane(origin, peg.details.origin);
  const facing = facingDeg(peg.details);
  const reachM =
    Math.min(peg.details.longestCastM ?? lake.details.longestCastM, lake.details.longestCastM) + 10;
  const box = boxBefore(originM, facing, reachM);
  const outline = outlineInPlane(origin, chart.content.built.outline);
  const rings = ringsOf(outline).map((ring) => closed(ring).flatMap(({ xM, yM }) => [xM, yM]));
  const isobaths = sight.sees.depth ? chart.content.built.isobaths : [];
  const water = rings
    .map((ring) => clipRing(thinLine(ring, FINEST_M).slice(0, -2), box))
    .filter((ring) => ring.length > 0);
  const grid = extractGrid(layersOf(chart.content), box, sight.sees);
  for (let toleranceM = FINEST_M; ; toleranceM *= 1.6) {
    const cut = (line: readonly number[]) => clipLine(line, box).map((piece) => thinLine(piece, toleranceM));
    const shore = rings.flatMap(cut);
    const drawn = isobaths
      .map(({ levelM, lines }) => ({ levelM, lines: lines.flatMap(cut) }))
      .filter(({ lines }) => lines.length > 0);
    const numbers = [...shore, ...drawn.flatMap(({ lines }) => lines)].reduce(
      (sum, line) => sum + line.length,
      0,
    );
    if (numbers <= MOST_NUMBERS || toleranceM > 5)
      return {
        originM: { xM: tenth(originM.xM), yM: tenth(originM.yM) },
        facingDeg: Math.round(facing),
        shore: shore.map(tenths),
        water: water.map(tenths),
        contourStepM: chart.contourStepM,
        grid,
        isobaths: drawn.map(({ levelM, lines }) => ({ levelM, lines: lines.map(tenths) })),
      };
  }
}

const tenth = (lengthM: number): number => Math.round(lengthM * 10) / 10;
const tenths = (line: readonly number[]): number[] => line.map(tenth);

function closed(ring: readonly Point[]): Point[] {
  const first = ring[0];
  return first ? [...ring, first] : [];
}

/** The box round the water a peg casts over: out to its reach, a little behind and to both sides. */
function boxBefore(from: Point, facing: number, reachM: number): Box {
  const turn = (facing * Math.PI) / 180;
  const corners = [
    [-BEHIND_M, -BESIDE_M],
    [-BEHIND_M, BESIDE_M],
    [reachM, -BESIDE_M],
    [reachM, BESIDE_M],
  ].map(([ahead = 0, right = 0]) => ({
    xM: from.xM + ahead * Math.sin(turn) + right * Math.cos(turn),
    yM: from.yM + ahead * Math.cos(turn) - right * Math.sin(turn),
  }));
  const xs = corners.map(({ xM }) => xM);
  const ys = corners.map(({ yM }) => yM);
  return { westM: Math.min(...xs), eastM: Math.max(...xs), southM: Math.min(...ys), northM: Math.max(...ys) };
}
