import type { Lake } from '@mereward/db/entities/lakes/lake';
import type { Mark } from '@mereward/db/entities/lakes/mark';
import type { Peg } from '@mereward/db/entities/lakes/peg';
import { outlineInPlane } from '@mereward/shared/geometry/outline';
import type { CastSite } from '@mereward/shared/surveys/cast-site';
import { stanceSigmaM } from '@mereward/shared/surveys/error-budget';
import { originOfLake } from '../lakes/found';

/** The ground a cast that is only told of is reduced on: no visit, so no board and no hour. */
export function siteOf({ peg, lake }: { peg: Peg; lake: Lake }, mark: Mark | null): CastSite {
  const origin = originOfLake(lake);
  const { details } = peg;
  return {
    origin,
    outline: outlineInPlane(origin, lake.details.outline),
    stance: {
      place: details.origin,
      sigmaM: stanceSigmaM(details.originFixedBy),
      originMarked: details.originMarked,
    },
    mark: mark && {
      name: mark.details.name,
      place: mark.details.position,
      sigmaM: mark.details.sigmaM,
      permanence: mark.details.permanence,
      ofThisLake: true,
    },
    gauge: null,
    observedAt: '',
    lead: null,
    earlier: [],
  };
}
