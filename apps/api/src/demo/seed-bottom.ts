import { SurveyCast } from '@mereward/db/entities/surveys/survey-cast';
import { fromPlane, pointAlong, toPlane, type Point } from '@mereward/shared/geometry/plane';
import type { LakePolygon } from '@mereward/shared/lakes/contract';
import type { EntityManager } from 'typeorm';
import type { Ctx } from '../ctx';
import { recordBottomEvent } from '../surveys/bottom-events';
import { confirmBottom } from '../surveys/confirmed-bottoms';
import { keepLead } from '../surveys/leads';
import { HARD_SPOT, DUG_GULLY, farOstleBed, type Ridge } from './bed';
import { demoCtx } from './demo-ctx';
import { FAR_OSTLE_LAKE, OSTLEMERE_ID, OSTLE_POOL_LAKE } from './fishery';
import { IDRIS } from './people';
import { demoId } from './random';
import { demoVisitId, type DemoSurvey } from './seed-survey';
import { DEMO_KIT } from './simulate-casts';
import type { DemoDays } from './survey-days';

const civil = (at: Date): string => at.toISOString().slice(0, 10);

/** Every so many casts of a survey were grabbed at, and what the invented bed holds there was brought up. */
const GRAB_EVERY = 55;

/** Grabs made on the day of a survey, where some of its casts lay. */
export async function seedGrabs(ctx: Ctx, survey: DemoSurvey): Promise<void> {
  const casts = await ctx.tx.find(SurveyCast, {
    where: { visitId: demoVisitId(survey) },
    order: { seq: 'ASC' },
  });
  for (const { id, seq, reduced } of casts) {
    if (seq % GRAB_EVERY !== 0 || !reduced.ok) continue;
    const bed = survey.bed(toPlane(survey.lake.water.centre, reduced.sounding.position)); // the bed has a plane of its own
    if (!bed) continue;
    await confirmBottom(ctx, survey.lake.id, {
      id: demoId(`grab ${survey.key} ${seq}`),
      castId: id,
      position: null,
      positionSigmaM: 1,
      substrate: bed.substrate,
      cover: bed.cover,
      method: 'grab',
      day: civil(survey.day),
      note: '',
    });
  }
}

/** Metres from the middle of the hard spot: on it, and in the silt round it. */
const SPOT_GRABS_M = [3, 14];

/** Grabs on and round the hard spot, on the day it was cast over closely. */
export async function seedSpotGrabs(ctx: Ctx, day: Date): Promise<void> {
  for (const awayM of SPOT_GRABS_M)
    for (let turn = 0; turn < 360; turn += 60) {
      const place = pointAlong(HARD_SPOT, turn, awayM);
      const bed = farOstleBed(place);
      if (!bed) continue;
      const [lon, lat] = fromPlane(FAR_OSTLE_LAKE.water.centre, place);
      await confirmBottom(ctx, FAR_OSTLE_LAKE.id, {
        id: demoId(`grab spot ${awayM} ${turn}`),
        castId: null,
        position: [Number(lon.toFixed(7)), Number(lat.toFixed(7))],
        positionSigmaM: 1,
        substrate: bed.substrate,
        cover: bed.cover,
        method: 'grab',
        day: civil(day),
        note: '',
      });
    }
}

/** The lead of the demo's kit, counted down over spots read by float. */
export async function seedLead(ctx: Ctx, day: Date): Promise<void> {
  await keepLead(ctx, OSTLEMERE_ID, {
    id: demoId('lead 85 g'),
    name: 'Three-ounce ball, orange tape',
    leadG: DEMO_KIT.leadG,
    leadShape: DEMO_KIT.leadShape,
    lineType: DEMO_KIT.lineType,
    falls: [
      { seconds: 0.9, depthM: 1.3 },
      { seconds: 1.6, depthM: 2.2 },
      { seconds: 2.2, depthM: 3.2 },
      { seconds: 2.9, depthM: 4 },
    ],
    calibratedOn: civil(day),
    note: 'Rod up, line held on the fingers',
  });
}

/** Works on Far Ostle between its two charts, each where it was drawn: weed cut in the west bay, the gully's west end dug out. */
export async function seedWorks(tx: EntityManager, days: DemoDays): Promise<void> {
  await recordBottomEvent(demoCtx(tx, IDRIS, later(days.westBayCut)), FAR_OSTLE_LAKE.id, {
    id: demoId('weed cut FO'),
    kind: 'weed_cut',
    area: drawnArea(WEST_BAY_CUT),
    happenedOn: civil(days.westBayCut),
    ends: ['cover'],
    note: 'A strip cut from the punt and taken out the same day',
  });
  await recordBottomEvent(demoCtx(tx, IDRIS, later(days.gullyDug)), FAR_OSTLE_LAKE.id, {
    id: demoId('gully dug FO'),
    kind: 'dredged',
    area: drawnArea(roundRidge(DUG_GULLY, 16)),
    happenedOn: civil(days.gullyDug),
    ends: ['cover', 'substrate', 'depth'],
    note: 'The west end of the gully dug out from the bank, long reach',
  });
}

const DAY_MS = 86_400_000;
const later = (day: Date): Date => new Date(day.getTime() + DAY_MS);

/** Counter-clockwise, in Far Ostle's plane: the mouth of the west bay. */
const WEST_BAY_CUT: readonly Point[] = [
  { xM: -112, yM: -30 },
  { xM: -92, yM: -22 },
  { xM: -90, yM: 6 },
  { xM: -104, yM: 22 },
  { xM: -112, yM: 6 },
];

/** A strip so wide to either side of a ridge's line, and past its ends. */
function roundRidge({ from, to }: Ridge, wideM: number): Point[] {
  const lengthM = Math.hypot(to.xM - from.xM, to.yM - from.yM);
  const [ex, ey] = [(wideM * (to.xM - from.xM)) / lengthM, (wideM * (to.yM - from.yM)) / lengthM];
  return [
    { xM: from.xM - ex + ey, yM: from.yM - ey - ex },
    { xM: to.xM + ex + ey, yM: to.yM + ey - ex },
    { xM: to.xM + ex - ey, yM: to.yM + ey + ex },
    { xM: from.xM - ex - ey, yM: from.yM - ey + ex },
  ];
}

function drawnArea(ring: readonly Point[]): LakePolygon {
  const places = [...ring, ...ring.slice(0, 1)].map((at): [number, number] => {
    const [lon, lat] = fromPlane(FAR_OSTLE_LAKE.water.centre, at);
    return [Number(lon.toFixed(7)), Number(lat.toFixed(7))];
  });
  return { type: 'Polygon', coordinates: [places] };
}

/** Ostle Pool's weed was cut before it was first surveyed. */
export async function seedWeedCut(ctx: Ctx, day: Date): Promise<void> {
  await recordBottomEvent(ctx, OSTLE_POOL_LAKE.id, {
    id: demoId('weed cut OP'),
    kind: 'weed_cut',
    area: null,
    happenedOn: civil(day),
    ends: ['cover'],
    note: 'By hand from the punt, two days',
  });
}
