import { chartAge, touches, type AgeNow } from '@mereward/shared/charts/chart-age';
import type { ChartChange } from '@mereward/shared/charts/chart-change-contract';
import { columnXM, rowYM } from '@mereward/shared/charts/grid';
import type { Point } from '@mereward/shared/geometry/point';
import { ownerAt } from '@mereward/shared/lakes/peg-waters';
import { civilDay } from '@mereward/shared/time/civil-day';
import type { WatersFound } from '../lakes/peg-waters';
import type { PegGround } from './peg-chart';

type At = { ground: PegGround; waters: WatersFound; spots: readonly Point[]; now: Date };

/**
 * How far the chart may be trusted before one peg: of what happened since, only what touched its own water, or one of the
 * spots shown on its page, or the whole lake.
 */
export function ageAtPeg({ ground, waters, spots, now }: At): AgeNow | null {
  const { chart, fishery, peg } = ground;
  if (!chart) return null;
  const { changes, levelsMoved } = chart.ageNow;
  const here = changes.filter(
    (change) => touchesWater(change, waters, peg.id) || spots.some((spot) => touches(change, spot)),
  );
  const changed = here.length > 0 || levelsMoved;
  return {
    age: chartAge(chart.surveyedTo, civilDay(now, fishery.zone), changed),
    changes: here,
    levelsMoved,
  };
}

/** Whether any cell of a peg's water, or any corner of the area within it, was touched: an area may be smaller than a cell. */
function touchesWater(change: ChartChange, { pegs, waters }: WatersFound, pegId: string): boolean {
  if (change.rings === null) return true;
  const own = pegs.findIndex(({ id }) => id === pegId);
  const corner = change.rings.some((ring) =>
    ring.some((xM, i) => i % 2 === 0 && ownerAt(waters, { xM, yM: ring[i + 1] ?? 0 }) === own),
  );
  if (corner) return true;
  const { frame, owner } = waters;
  return owner.some(
    (each, node) =>
      each === own &&
      touches(change, {
        xM: columnXM(frame, node % frame.columns),
        yM: rowYM(frame, Math.floor(node / frame.columns)),
      }),
  );
}
