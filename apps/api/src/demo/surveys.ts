import { farOstleBed, ostlePoolBed } from './bed';
import { FAR_OSTLE_LAKE, OSTLE_POOL_LAKE } from './fishery';
import { JOAN, TOM, type DemoPerson } from './people';
import type { DemoSurvey } from './seed-survey';
import type { DemoDays } from './survey-days';

const NOT_CAST = new Set(['FO20', 'FO24']); // closed, and under the line: nobody cast there

/** The demo's surveys: Far Ostle on two days by two people, Ostle Pool on one. */
export function demoSurveys(days: DemoDays): (DemoSurvey & { surveyor: DemoPerson })[] {
  const pegs = FAR_OSTLE_LAKE.pegs.filter(({ details }) => !NOT_CAST.has(details.number));
  const farOstle = { lake: FAR_OSTLE_LAKE, bed: farOstleBed };
  return [
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
