import { farOstleAutumnBed, farOstleBed, ostlePoolBed } from './bed';
import { FAR_OSTLE_LAKE, OSTLE_POOL_LAKE } from './fishery';
import { JOAN, TOM, type DemoPerson } from './people';
import type { DemoSurvey } from './seed-survey';
import type { DemoDays } from './survey-days';

const NOT_CAST = new Set(['FO20', 'FO24']); // closed, and under the line: nobody cast there

const HOUR_MS = 3_600_000;
const IN_AUTUMN = new Set(['FO1', 'FO2', 'FO3', 'FO21', 'FO22', 'FO23']); // round the gully's west end and the west bay

/**
 * The demo's surveys: Far Ostle's west in autumn and the whole of it in spring, with one place cast over closely; Ostle Pool
 * on one day.
 */
export function demoSurveys(days: DemoDays): (DemoSurvey & { surveyor: DemoPerson })[] {
  const pegs = FAR_OSTLE_LAKE.pegs.filter(({ details }) => !NOT_CAST.has(details.number));
  const farOstle = { lake: FAR_OSTLE_LAKE, bed: farOstleBed };
  return [
    {
      lake: FAR_OSTLE_LAKE,
      bed: farOstleAutumnBed,
      key: 'FO 0',
      title: 'Far Ostle, the west end',
      pegs: pegs.filter(({ details }) => IN_AUTUMN.has(details.number)),
      day: days.farOstleAutumn,
      seed: 20251003,
      surveyor: JOAN,
    },
    {
      ...farOstle,
      key: 'FO 1',
      title: 'Far Ostle, pegs 1 to 12',
      pegs: pegs.slice(0, 12),
      day: days.farOstleFirst,
      seed: 20260403,
      surveyor: JOAN,
    },
    {
      ...farOstle,
      key: 'FO 2',
      title: 'Far Ostle, pegs 13 to 23',
      pegs: pegs.slice(12),
      day: days.farOstleSecond,
      seed: 20260411,
      surveyor: TOM,
    },
    {
      ...farOstle,
      key: 'FO 3',
      title: 'The hard spot off peg 18',
      pegs: pegs.filter(({ details }) => details.number === 'FO18'),
      day: new Date(days.farOstleSecond.getTime() + 6 * HOUR_MS),
      seed: 20260412,
      surveyor: TOM,
      closely: { bearingDeg: 354, wraps: 12 },
    },
    {
      lake: OSTLE_POOL_LAKE,
      bed: ostlePoolBed,
      key: 'OP 1',
      title: 'Ostle Pool, first look',
      pegs: OSTLE_POOL_LAKE.pegs.filter((_, i) => i % 2 === 0),
      day: days.ostlePool,
      seed: 20261110,
      surveyor: JOAN,
    },
  ];
}
