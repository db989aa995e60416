import { useMemo } from 'react';
import { reduceCast } from '@mereward/shared/surveys/cast-reduction';
import type { CastObservation, CastView, Reduced } from '@mereward/shared/surveys/contract';
import { castSiteOf, type Surroundings } from '@/features/surveys/cast-site-of';

/** The reduction of what is being typed, on this device: the same function the server runs. Null while incomplete. */
export function useCastReduction(
  surroundings: Surroundings | null,
  observation: CastObservation | null,
  casts: readonly CastView[],
): Reduced | null {
  return useMemo(() => {
    if (surroundings === null || observation === null) return null;
    const { peg, visit } = surroundings;
    const earlier = casts.filter(({ pegId }) => pegId === peg.id).map((cast) => cast.observation);
    const observedAt = visit.endedAt ?? visit.startedAt;
    return reduceCast(observation, visit.kit, castSiteOf(surroundings, { observation, observedAt, earlier }));
  }, [surroundings, observation, casts]);
}

/** A kept cast's reduction with every step, worked out here from what was kept: a visit's answer leaves steps out. */
export function useKeptReduction(
  surroundings: Surroundings | null,
  cast: CastView,
  casts: readonly CastView[],
): Reduced | null {
  return useMemo(() => {
    if (surroundings === null) return null;
    const others = casts.filter(({ id, pegId }) => pegId === cast.pegId && id !== cast.id);
    const site = castSiteOf(surroundings, { ...cast, earlier: others.map((other) => other.observation) });
    return reduceCast(cast.observation, surroundings.visit.kit, site);
  }, [surroundings, cast, casts]);
}
