import { outlineInPlane } from '@mereward/shared/geometry/outline';
import type { LakeView, PegView } from '@mereward/shared/lakes/contract';
import type { CastSite } from '@mereward/shared/surveys/cast-site';
import type { CastObservation, VisitView, VisitWithCasts } from '@mereward/shared/surveys/contract';
import { Reducing } from '@mereward/shared/surveys/reducing-contract';
import { stanceSigmaM } from '@mereward/shared/surveys/error-budget';

export type Surroundings = {
  lake: LakeView;
  peg: PegView;
  visit: VisitView;
  reducing: Reducing | null; // as it came with the visit; null: the built-in table and no calibrated lead
};

/** What a visit says its casts are reduced with beside its kit. */
export const reducingOf = ({ reducing }: Pick<VisitWithCasts, 'reducing'>): Reducing | null =>
  Reducing.safeParse(reducing).data ?? null;

/** What a cast is reduced against, from what this phone has read: the same as the server builds from its rows. */
export function castSiteOf(
  { lake, peg, visit, reducing }: Surroundings,
  cast: { observation: CastObservation; observedAt: string; earlier: readonly CastObservation[] },
): CastSite {
  const { aim } = cast.observation;
  const mark = aim.by === 'mark' ? lake.marks.find(({ id }) => id === aim.markId) : undefined;
  const board = lake.boards.find(({ id }) => id === visit.boardId);
  const { origin, originFixedBy, originMarked } = peg.details;
  return {
    origin: lake.origin,
    outline: outlineInPlane(lake.origin, lake.details.outline),
    stance: { place: origin, sigmaM: stanceSigmaM(originFixedBy), originMarked },
    mark: mark
      ? {
          name: mark.details.name,
          place: mark.details.position,
          sigmaM: mark.details.sigmaM,
          permanence: mark.details.permanence,
          ofThisLake: true, // only this lake's marks are offered
        }
      : null,
    gauge: {
      startAt: visit.startedAt,
      startM: visit.gaugeStartM,
      endAt: visit.endedAt,
      endM: visit.gaugeEndM,
      datumM: visit.datumM,
      higherNumberHigherWater: board?.details.higherNumberHigherWater ?? true,
    },
    observedAt: cast.observedAt,
    lead: reducing?.lead ?? null,
    earlier: cast.earlier,
    tables: reducing?.feel ?? undefined,
  };
}
