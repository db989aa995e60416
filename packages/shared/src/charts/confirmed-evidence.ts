import { fadedCover, monthsSince } from '../surveys/bottom-fading';
import { endedBy, type BottomEnding } from '../surveys/bottom-ending';
import type { FadeMonths } from '../surveys/bottom-table-contract';
import type { ConfirmedBy } from '../surveys/confirmed-contract';
import type { ConfirmedPlace } from '../surveys/confirmed-pairs';
import { Cover, CoverShares, Substrate, SubstrateShares } from '../surveys/contract';
import type { FeltBottom } from './bottom-layers';

/** How many felt casts one confirmed bottom is worth in the maps. Common practice, no published source. */
export const CONFIRMED_WORTH_CASTS: Readonly<Record<ConfirmedBy, number>> = {
  pronged_lead: 3, // it brings back what it caught on, which need not be all there is
  grab: 6,
  diver: 8,
  drain_down: 10, // seen dry
};

/** Confirmed bottoms as evidence for the maps: certain of one class, as strong as the way they were come by. */
export function confirmedEvidence(
  places: readonly ConfirmedPlace[],
  { endings, fadeMonths, asOf }: { endings: readonly BottomEnding[]; fadeMonths: FadeMonths; asOf: string },
): FeltBottom[] {
  return places.flatMap((place) => {
    const seen = { xM: place.xM, yM: place.yM, day: place.day };
    const substrate = endedBy(endings, 'substrate', seen) ? null : place.substrate;
    const cover = endedBy(endings, 'cover', seen) ? null : place.cover;
    if (substrate === null && cover === null) return [];
    const variance = place.sigmaM * place.sigmaM;
    return [
      {
        id: place.id,
        grade: 'A' as const,
        xM: place.xM,
        yM: place.yM,
        spread: { xx: variance, xy: 0, yy: variance },
        worthCasts: CONFIRMED_WORTH_CASTS[place.method],
        substrate: substrate && SubstrateShares.parse(certain(Substrate.options, substrate)),
        cover:
          cover &&
          fadedCover(
            CoverShares.parse(certain(Cover.options, cover)),
            fadeMonths,
            monthsSince(place.day, asOf),
          ),
      },
    ];
  });
}

const certain = (classes: readonly string[], name: string): Record<string, number> =>
  Object.fromEntries(classes.map((each) => [each, each === name ? 1 : 0]));
