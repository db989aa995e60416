import type { PegPageView } from '@mereward/shared/charts/contract';
import type { FisheryView } from '@mereward/shared/fisheries/contract';
import type { LakeView } from '@mereward/shared/lakes/contract';

type Seen<T> = { value: T; readAtMs: number };

/** What this device has read lately of a fishery and its waters. */
export type SeenWaters = {
  fisheries: readonly Seen<FisheryView>[];
  lakes: readonly Seen<LakeView>[];
  pegs: readonly Seen<PegPageView>[];
};

export type EmergencyFishery = {
  id: string;
  name: string;
  dutyPhone: string;
  meetingPoint: string;
  gridReference: string;
  lakes: readonly { id: string; name: string; route: string; signal: string }[];
  pegs: readonly PegPageView[];
  readAtMs: number;
};

const MOST_PEGS = 6;

const newestFirst = <T>(seen: readonly Seen<T>[]): Seen<T>[] =>
  [...seen].sort((a, b) => b.readAtMs - a.readAtMs);

/** The fisheries seen on this device with what an emergency asks for, the one seen last first. */
export function emergencyFisheries({ fisheries, lakes, pegs }: SeenWaters): EmergencyFishery[] {
  const pages = newestFirst(pegs);
  const ids = new Set([
    ...fisheries.map(({ value }) => value.id),
    ...lakes.map(({ value }) => value.fisheryId),
    ...pages.map(({ value }) => value.fishery.id),
  ]);
  const made = [...ids].map((id): EmergencyFishery => {
    const fishery = fisheries.find(({ value }) => value.id === id);
    const ownLakes = newestFirst(lakes.filter(({ value }) => value.fisheryId === id));
    const ownPegs = pages.filter(({ value }) => value.fishery.id === id);
    const told = fishery?.value.details ?? ownPegs[0]?.value.fishery;
    const times = [...ownLakes, ...ownPegs, ...(fishery ? [fishery] : [])].map(({ readAtMs }) => readAtMs);
    const named = new Map<string, EmergencyFishery['lakes'][number]>();
    for (const { value } of ownPegs) {
      const { id: lakeId, name, emergencyAccess: route, phoneSignal: signal } = value.lake;
      if (!named.has(lakeId)) named.set(lakeId, { id: lakeId, name, route, signal });
    }
    for (const { value } of ownLakes) {
      const { name, emergencyAccess: route, phoneSignal: signal } = value.details;
      named.set(value.id, { id: value.id, name, route, signal });
    }
    return {
      id,
      name: told?.name ?? ownLakes[0]?.value.fisheryName ?? '',
      dutyPhone: told?.dutyPhone ?? '',
      meetingPoint: told?.meetingPoint ?? '',
      gridReference: fishery?.value.details.gridReference ?? '',
      lakes: [...named.values()],
      pegs: ownPegs.slice(0, MOST_PEGS).map(({ value }) => value),
      readAtMs: Math.max(...times),
    };
  });
  return made.sort((a, b) => b.readAtMs - a.readAtMs);
}
