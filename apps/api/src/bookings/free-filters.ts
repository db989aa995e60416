import type { FreeAsked, PegGround } from '@mereward/shared/bookings/availability-contract';
import type { PegDetails } from '@mereward/shared/lakes/contract';

export type FilteredPeg = { details: PegDetails; ground: PegGround | null };

const STEP_FREE = {
  measured_suitable: ['measured_suitable'],
  assisted: ['measured_suitable', 'assisted'],
} as const satisfies Record<NonNullable<FreeAsked['stepFree']>, readonly PegDetails['stepFree']['kind'][]>;

/** Does a peg have what somebody asks for? What is not known of it is not there. */
export function passes({ details, ground }: FilteredPeg, asked: FreeAsked): boolean {
  const { access, stepFree } = details;
  const kinds: readonly string[] | null = asked.stepFree ? STEP_FREE[asked.stepFree] : null;
  return (
    details.people >= asked.people &&
    details.rods >= asked.rods &&
    (asked.fromParkingM === undefined || (access.fromParkingM ?? Infinity) <= asked.fromParkingM) &&
    (asked.barrow === undefined || access.barrow === 'yes') &&
    (kinds === null || kinds.includes(stepFree.kind)) &&
    (asked.leastDepthM === undefined || (ground?.deepestM ?? -Infinity) >= asked.leastDepthM) &&
    (asked.mostDepthM === undefined || (ground?.deepestM ?? Infinity) <= asked.mostDepthM) &&
    (asked.bottom === undefined || (ground?.bottoms.includes(asked.bottom) ?? false))
  );
}
