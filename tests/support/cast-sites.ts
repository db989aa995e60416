import { geodesicAlong, type LonLat } from '@mereward/shared/geometry/geodesic';
import { pointAlong } from '@mereward/shared/geometry/plane';
import type { Outline } from '@mereward/shared/geometry/polygon';
import type { AimMark, CastSite } from '@mereward/shared/surveys/cast-site';
import type { CastObservation, Reduced, SoundingView } from '@mereward/shared/surveys/contract';

export const MARK_ID = '6a1f0d52-3c1e-4f9e-9a54-0d6a3b6f7c03';
export const STANCE: LonLat = [-1.1427, 52.3651];

/** A round water touching the origin, its middle `radiusM` north of it. */
export function roundWater(radiusM: number): Outline {
  const middle = { xM: 0, yM: radiusM };
  const shore = Array.from({ length: 180 }, (_, i) => pointAlong(middle, 90 - 2 * i, radiusM));
  return { shore, islands: [] };
}

/** The pump-house chimney, 148 m due north of the stance. */
export function aChimney(from: LonLat = STANCE, wishes: Partial<AimMark> = {}): AimMark {
  const place = geodesicAlong(from, 0, 148);
  return {
    name: 'pump-house chimney',
    place,
    sigmaM: 0.5,
    permanence: 'permanent',
    ofThisLake: true,
    ...wishes,
  };
}

/** A marked peg on the south shore of a water 160 m across, read from a board at datum 0.62. */
export function aCastSite(wishes: Partial<CastSite> = {}): CastSite {
  return {
    origin: STANCE,
    outline: roundWater(80),
    stance: { place: STANCE, sigmaM: 0.3, originMarked: true },
    mark: aChimney(),
    gauge: {
      startAt: '2027-04-03T08:05:00Z',
      startM: 0.62,
      endAt: '2027-04-03T10:40:00Z',
      endM: 0.62,
      datumM: 0.62,
      higherNumberHigherWater: true,
    },
    observedAt: '2027-04-03T09:20:00Z',
    lead: null,
    earlier: [],
    ...wishes,
  };
}

/** The sounding of a cast that must reduce. */
export function soundingOf(reduced: Reduced): SoundingView {
  if (!reduced.ok) throw new Error(`Refused: ${reduced.reason}`);
  return reduced.sounding;
}

/** Why a cast that must not reduce was refused. */
export function reasonOf(reduced: Reduced): string {
  if (reduced.ok) throw new Error('It was reduced');
  return `${reduced.reason}. ${reduced.remedy}`;
}

export const byCompass = (bearingDeg: number): CastObservation['aim'] => ({
  by: 'compass',
  bearingDeg,
  method: 'compass_phone',
});
