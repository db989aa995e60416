import type { Mark } from '@mereward/db/entities/lakes/mark';
import type { Cast } from '@mereward/shared/charts/chart-answers';
import { countWords, stickWords } from '@mereward/shared/charts/spot-words';
import { geodesicBetween, type LonLat } from '@mereward/shared/geometry/geodesic';
import { windFor, type SpotKit } from '@mereward/shared/surveys/same-spot';
import { markFor } from './spot-reach';

type Throw = { from: LonLat; to: LonLat; kit: SpotKit; depthM: number; marks: readonly Mark[] };

/** How a place is reached from a stance over water `depthM` deep; null when it lies under the rod itself. */
export function castTo({ from, to, kit, depthM, marks }: Throw): Cast | null {
  const { distanceM, bearingDeg } = geodesicBetween(from, to);
  const wound = windFor(distanceM, kit, depthM);
  if (!wound.ok) return null;
  return castView({ rangeM: distanceM, bearingDeg, lineOutM: wound.lineOutM, wraps: wound.wraps }, kit, {
    mark: markFor(marks, { from, bearingDeg, aimedAt: null }),
  });
}

type Line = {
  rangeM: number;
  bearingDeg: number;
  lineOutM: number;
  wraps: { whole: number; remainderM: number };
};

export function castView(line: Line, kit: SpotKit, { mark }: Pick<Cast, 'mark'>): Cast {
  const { whole, remainderM } = toCentimetre(line.wraps, kit.stickSpacingM);
  return {
    rangeM: hundredth(line.rangeM),
    lineOutM: hundredth(line.lineOutM),
    wrapsWhole: whole,
    remainderM,
    stickSpacingM: kit.stickSpacingM,
    wrapReference: kit.wrapReference,
    countWords: `${countWords(whole, remainderM)} (${stickWords(kit.stickSpacingM)})`,
    bearingDeg: (Math.round(line.bearingDeg * 10) / 10) % 360,
    mark,
  };
}

/** The nearest centimetre, carried so that nearly a whole wrap over is one more. */
function toCentimetre({ whole, remainderM }: Line['wraps'], spacingM: number) {
  const rounded = hundredth(remainderM);
  return rounded < spacingM - 0.005 ? { whole, remainderM: rounded } : { whole: whole + 1, remainderM: 0 };
}

const hundredth = (value: number): number => Math.round(value * 100) / 100;
