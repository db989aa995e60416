import type { Lake } from '@mereward/db/entities/lakes/lake';
import type { Mark } from '@mereward/db/entities/lakes/mark';
import type { Peg } from '@mereward/db/entities/lakes/peg';
import type { SurveyVisit } from '@mereward/db/entities/surveys/survey-visit';
import type { LonLat } from '@mereward/shared/geometry/plane';
import type { Outline } from '@mereward/shared/geometry/polygon';
import { reduceCast } from '@mereward/shared/surveys/cast-reduction';
import type { CastSite, VisitGauge } from '@mereward/shared/surveys/cast-site';
import type { CastObservation, Reduced } from '@mereward/shared/surveys/contract';
import { stanceSigmaM } from '@mereward/shared/surveys/error-budget';
import type { LeadCalibration } from '@mereward/shared/surveys/lead-fall';
import type { FeelInForce } from './bottom-feel';

/** What the casts of one visit are reduced against, loaded once. */
export type VisitSite = {
  visit: SurveyVisit;
  lake: Lake;
  origin: LonLat;
  outline: Outline;
  gauge: VisitGauge;
  pegs: ReadonlyMap<string, Peg>;
  marks: ReadonlyMap<string, Mark>;
  table: FeelInForce;
  lead: LeadCalibration | null; // of the lead the visit's kit names
};

export type ObservedCast = { id: string; pegId: string; observedAt: Date; observation: CastObservation };

/** Reduces one cast; `others` are the peg's other casts of the visit. */
export function reduceAt(site: VisitSite, cast: ObservedCast, others: readonly CastObservation[]): Reduced {
  const peg = site.pegs.get(cast.pegId);
  if (!peg)
    return { ok: false, reason: 'The peg of this cast is gone', remedy: 'Ask the manager', steps: [] };
  const { aim } = cast.observation;
  const mark = aim.by === 'mark' ? site.marks.get(aim.markId) : undefined;
  const castSite: CastSite = {
    origin: site.origin,
    outline: site.outline,
    stance: {
      place: peg.details.origin,
      sigmaM: stanceSigmaM(peg.details.originFixedBy),
      originMarked: peg.details.originMarked,
    },
    mark: mark
      ? {
          name: mark.details.name,
          place: mark.details.position,
          sigmaM: mark.details.sigmaM,
          permanence: mark.details.permanence,
          ofThisLake: true, // only this lake's marks are looked in
        }
      : null,
    gauge: site.gauge,
    observedAt: cast.observedAt.toISOString(),
    lead: site.lead,
    earlier: others,
    tables: site.table.feel,
  };
  return reduceCast(cast.observation, site.visit.kit, castSite);
}

/** Reduces every cast of a visit, each beside its peg's others: of those only solid stops bear on one another. */
export function reduceAll(site: VisitSite, casts: readonly ObservedCast[]): Map<string, Reduced> {
  const stops = casts.filter((cast) => cast.observation.drag === 'solid_stop');
  const reduced = new Map<string, Reduced>();
  for (const cast of casts) {
    const others = stops.filter((each) => each.pegId === cast.pegId && each.id !== cast.id);
    const seen = others.map((each) => each.observation);
    reduced.set(cast.id, reduceAt(site, cast, seen));
  }
  return reduced;
}
