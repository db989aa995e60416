import { SurveyCast } from '@mereward/db/entities/surveys/survey-cast';
import type { Ctx } from '../ctx';
import { recordBottomEvent } from '../surveys/bottom-events';
import { confirmBottom } from '../surveys/confirmed-bottoms';
import { keepLead } from '../surveys/leads';
import { OSTLEMERE_ID, OSTLE_POOL_LAKE } from './fishery';
import { demoId } from './random';
import { demoVisitId, type DemoSurvey } from './seed-survey';
import { DEMO_KIT } from './simulate-casts';

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
    const bed = survey.bed(reduced.sounding);
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
