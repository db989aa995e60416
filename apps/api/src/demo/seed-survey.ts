import { SurveyCast } from '@mereward/db/entities/surveys/survey-cast';
import type { Point } from '@mereward/shared/geometry/plane';
import type { OpenVisit } from '@mereward/shared/surveys/contract';
import type { Ctx } from '../ctx';
import { closeVisit } from '../surveys/close-visit';
import { openVisit } from '../surveys/open-visit';
import type { Bed } from './bed';
import type { DemoLake } from './fishery';
import { demoId, seeded } from './random';
import { DEMO_KIT, simulateClosely, simulatePeg, type Plan } from './simulate-casts';
import { demoLevelM } from './survey-days';

export type DemoSurvey = {
  key: string;
  title: string;
  lake: DemoLake;
  bed: (p: Point) => Bed | null;
  pegs: DemoLake['pegs'];
  day: Date;
  seed: number;
  closely?: Plan; // round one place, and not the peg's whole arc
};

const MINUTE_MS = 60_000;

export const demoVisitId = (survey: Pick<DemoSurvey, 'key'>): string => demoId(`visit ${survey.key}`);

/** One day on the bank: a visit opened, its pegs cast over, closed. `ctx` is the surveyor's. */
export async function seedSurvey(ctx: Ctx, survey: DemoSurvey): Promise<void> {
  const { lake, day } = survey;
  const visitId = demoVisitId(survey);
  const gaugeM = demoLevelM(lake.details.datumM, day);
  await openVisit(ctx, lake.id, visitBody(survey, gaugeM));
  const casts = castsOf(survey, gaugeM);
  for (let i = 0; i < casts.length; i += 400)
    await ctx.tx
      .createQueryBuilder()
      .insert()
      .into(SurveyCast)
      .values(casts.slice(i, i + 400).map((cast) => ({ ...cast, visitId, keptBy: surveyorOf(ctx) })))
      .updateEntity(false)
      .execute();
  const last = casts[casts.length - 1]?.observedAt ?? day;
  await closeVisit(ctx, visitId, {
    endedAt: new Date(last.getTime() + 10 * MINUTE_MS).toISOString(),
    gaugeEndM: gaugeM,
  });
}

/** How a day of the demo's surveys is opened; the board reads `gaugeM`. */
export const visitBody = (
  { key, title, lake, day }: Pick<DemoSurvey, 'key' | 'title' | 'lake' | 'day'>,
  gaugeM: number,
): OpenVisit => ({
  id: demoVisitId({ key }),
  title,
  competence: 'lead',
  boardId: lake.board.id,
  startedAt: day.toISOString(),
  gaugeStartM: gaugeM,
  weather: { windForce: 2, windFrom: 'SW', note: 'Light airs, dry' },
  clarity: 'Clear to a metre',
  weedState: lake.prefix === 'OP' ? 'Low weed round the edge' : 'Weed in the west bay only',
  kit: { ...DEMO_KIT, stickCheckedOn: day.toISOString().slice(0, 10) },
  consentToPublish: true,
});

function surveyorOf({ actor }: Ctx): string {
  if (actor.kind !== 'account') throw new RangeError('A stranger keeps no casts');
  return actor.id;
}

function castsOf(survey: DemoSurvey, gaugeM: number) {
  const random = seeded(survey.seed);
  const { pegs, closely } = survey;
  const at = { ...survey, gaugeM, random };
  const thrown = pegs.flatMap((peg) => (closely ? simulateClosely(at, peg, closely) : simulatePeg(at, peg)));
  return thrown.map(({ pegId, observation }, i) => {
    const observedAt = new Date(survey.day.getTime() + (i + 1) * MINUTE_MS * 0.75);
    return {
      id: demoId(`cast ${survey.key} ${i}`),
      pegId,
      lineId: demoId(`line ${survey.key} ${i}`),
      importId: null,
      seq: i + 1,
      observedAt,
      receivedAt: observedAt,
      observation,
      undoneAt: null,
      reduced: { ok: false as const, reason: 'Not reduced yet', remedy: 'Close the visit', steps: [] },
    };
  });
}
