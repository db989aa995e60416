import type { ChartInput } from '@mereward/shared/charts/build-chart';
import type { Point } from '@mereward/shared/geometry/plane';
import { reduceCast } from '@mereward/shared/surveys/cast-reduction';
import type { CastSite } from '@mereward/shared/surveys/cast-site';
import { stanceSigmaM } from '@mereward/shared/surveys/error-budget';
import type { Bed } from './bed';
import type { DemoLake } from './fishery';
import { seeded } from './random';
import { DEMO_KIT, simulatePeg, type SimulatedCast } from './simulate-casts';

const HOUR = '2026-04-03T12:00:00Z';

/** Every peg of a demo lake cast over at chart datum and reduced: what a chart of it is built from. No database. */
export function demoReduced(
  lake: DemoLake,
  bed: (p: Point) => Bed | null,
  seedNumber: number,
): ChartInput['soundings'] {
  const random = seeded(seedNumber);
  const casts = lake.pegs.flatMap((peg) =>
    simulatePeg({ lake, bed, gaugeM: lake.details.datumM, random }, peg),
  );
  return casts.flatMap((cast, i) => sounding(lake, cast, i));
}

function sounding(lake: DemoLake, cast: SimulatedCast, number: number): ChartInput['soundings'] {
  const reduced = reduceCast(cast.observation, DEMO_KIT, siteOf(lake, cast));
  if (!reduced.ok || reduced.sounding.depthM === null || reduced.sounding.depthSigmaM === null) return [];
  const { xM, yM, depthM, depthSigmaM, grade, substrate, cover } = reduced.sounding;
  const id = String(number).padStart(5, '0');
  return [{ id, xM, yM, depthM, sigmaM: depthSigmaM, grade, substrate, cover }];
}

function siteOf(lake: DemoLake, { pegId, observation }: SimulatedCast): CastSite {
  const peg = lake.pegs.find(({ id }) => id === pegId);
  const { aim } = observation;
  const mark = lake.marks.find(({ id }) => aim.by === 'mark' && id === aim.markId);
  if (!peg || !mark) throw new RangeError('A simulated cast names a peg and a mark of its own lake');
  const { name, position, sigmaM, permanence } = mark.details;
  return {
    origin: lake.water.centre,
    outline: lake.water.outline,
    stance: {
      place: peg.details.origin,
      sigmaM: stanceSigmaM(peg.details.originFixedBy),
      originMarked: true,
    },
    mark: { name, place: position, sigmaM, permanence, ofThisLake: true },
    gauge: {
      startAt: HOUR,
      startM: lake.details.datumM,
      endAt: HOUR,
      endM: lake.details.datumM,
      datumM: lake.details.datumM,
      higherNumberHigherWater: true,
    },
    observedAt: HOUR,
    lead: null,
    earlier: [],
  };
}
