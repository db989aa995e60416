import { SurveyCast } from '@mereward/db/entities/surveys/survey-cast';
import type { SoundingView } from '@mereward/shared/surveys/contract';
import { In } from 'typeorm';
import { putSpot } from '../charts/spots';
import type { Ctx } from '../ctx';
import type { DemoLake } from './fishery';
import { demoId } from './random';

const FIRM = new Set(['gravel', 'clay', 'sand', 'silt_firm']);
const NAMES: Record<string, string> = {
  gravel: 'Gravel',
  clay: 'Hard clay',
  sand: 'Sand',
  silt_firm: 'Firm silt',
};

/** Up to three spots a peg, on its best casts of some visits: near, middle and far. */
export async function seedSpots(ctx: Ctx, lake: DemoLake, visitIds: readonly string[]): Promise<void> {
  const casts = await ctx.tx.find(SurveyCast, {
    where: { visitId: In([...visitIds]) },
    order: { visitId: 'ASC', seq: 'ASC' },
  });
  for (const peg of lake.pegs) {
    const soundings = casts.flatMap(({ pegId, reduced }) =>
      pegId === peg.id && reduced.ok ? [reduced.sounding] : [],
    );
    for (const [place, sounding] of bestOf(soundings).entries())
      await putSpot(
        ctx,
        { pegId: peg.id, spotId: demoId(`spot ${peg.details.number} ${place}`) },
        {
          version: null,
          details: {
            name: `${NAMES[sounding.bottom] ?? 'Spot'}, ${['close in', 'half way', 'far out'][place] ?? ''}`,
            position: [sounding.position[0], sounding.position[1]],
            usableRadiusM: 1.5,
            note: '',
          },
        },
      );
  }
}

/** One firm, surely known sounding of each third of the peg's reach, if there is one. */
function bestOf(soundings: readonly SoundingView[]): SoundingView[] {
  const firm = soundings.filter(
    ({ grade, bottom, depthM }) =>
      (grade === 'A' || grade === 'B') && FIRM.has(bottom) && (depthM ?? 0) > 0.8,
  );
  const thirds = [
    [10, 32],
    [32, 55],
    [55, 100],
  ] as const;
  return thirds.flatMap(([from, to]) => {
    const here = firm.filter(({ rangeM }) => rangeM >= from && rangeM < to);
    const best =
      here.find(({ bottom }) => bottom === 'gravel') ?? here.find(({ grade }) => grade === 'A') ?? here[0];
    return best ? [best] : [];
  });
}
