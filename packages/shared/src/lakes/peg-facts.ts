import { length, type LengthWish } from '../units/length-words';
import { dayName } from '../time/day-names';
import type { PegDetails } from './contract';

/** A term and what is known of it; nothing known is left out by whoever shows it. */
export type PegFact = { term: string; fact: string | null };

/** "Peg FO7, the Point" */
export const pegTitle = ({ number, name }: { number: string; name: string }): string =>
  name ? `Peg ${number}, ${name}` : `Peg ${number}`;

const BARROW = { yes: 'yes', no: 'no', unknown: 'not known' } as const;
const STEP_FREE = {
  measured_suitable: 'measured and found suitable',
  assisted: 'with help',
  not_suitable: 'not suitable',
  unknown: 'not looked at yet',
} as const;
const PLATFORM = { none: 'none', bank: 'natural bank', timber: 'timber', stone: 'stone' } as const;

const counted = (count: number | null, one: string, many = `${one}s`): string | null =>
  count === null ? null : `${String(count)} ${count === 1 ? one : many}`;

/** The way to a peg, and where to leave the car. */
export function wayFacts({ access, parking, stepFree }: PegDetails): PegFact[] {
  return [
    { term: 'From the car', fact: access.fromParkingM === null ? null : `${String(access.fromParkingM)} m` },
    { term: 'Path', fact: access.surface },
    { term: 'Steepest', fact: access.steepest },
    { term: 'Steps', fact: access.steps === 0 ? 'none' : counted(access.steps, 'step') },
    { term: 'Gates', fact: access.gates },
    { term: 'Barrow', fact: BARROW[access.barrow] },
    { term: 'In winter', fact: access.winter },
    { term: 'Wheelchair', fact: STEP_FREE[stepFree.kind] },
    { term: 'Measured there', fact: stepFree.facts },
    { term: 'Parking', fact: parking.bay },
    { term: 'Room for', fact: counted(parking.spaces, 'car') },
    { term: 'Walk', fact: counted(parking.walkMinutes, 'minute') },
    { term: 'Vehicles', fact: parking.vehicleLimit },
    { term: 'Car park in winter', fact: parking.winterClosure },
  ];
}

/** The peg itself: whose water, what to stand on, how many, what tackle. */
export function pegFacts(details: PegDetails, units: LengthWish): PegFact[] {
  const { platform, people, rods, shelters, waterWords, originMark, tackleLimits, longestCastM } = details;
  const size =
    platform.widthM !== null && platform.lengthM !== null
      ? `${length(platform.widthM, units)} × ${length(platform.lengthM, units)}`
      : null;
  return [
    { term: 'Its water', fact: waterWords },
    { term: 'Longest cast', fact: longestCastM === null ? null : length(longestCastM, units, 0) },
    { term: 'Stand at', fact: originMark },
    { term: 'Platform', fact: [PLATFORM[platform.kind], size].filter(Boolean).join(', ') },
    {
      term: 'Above the water at datum',
      fact: platform.heightM === null ? null : length(platform.heightM, units),
    },
    { term: 'Platform state', fact: platform.state },
    { term: 'Looked over', fact: platform.inspectedOn === null ? null : dayName(platform.inspectedOn) },
    { term: 'Anglers', fact: counted(people, 'angler') },
    { term: 'Rods', fact: counted(rods, 'rod') },
    { term: 'Shelters', fact: shelters === 0 ? 'none' : counted(shelters, 'shelter') },
    { term: 'Tackle limits', fact: tackleLimits },
  ];
}

type Place = {
  lake: { emergencyAccess: string; phoneSignal: string };
  fishery: { meetingPoint: string; dutyPhone: string };
};

/** Where to go and whom to ring when something has happened at a peg. `emergency` is null when it can't be read. */
export function emergencyFacts(
  { lake, fishery }: Place,
  emergency: PegDetails['emergency'] | null,
): PegFact[] {
  return [
    { term: 'Grid reference', fact: emergency?.gridReference ?? null },
    { term: 'Nearest throw line', fact: emergency?.throwLine ?? null },
    { term: 'Gate for an ambulance', fact: emergency?.ambulanceGate ?? null },
    { term: 'Ambulance route', fact: lake.emergencyAccess },
    { term: 'Meet it at', fact: fishery.meetingPoint },
    { term: 'Fishery’s duty phone', fact: fishery.dutyPhone },
    { term: 'Phone signal', fact: lake.phoneSignal },
  ];
}

/** Why a peg is not simply open, and how long: for under its heading. Empty when it is open. */
export function statusWords({ status, statusReason, statusUntil }: PegDetails): string {
  if (status === 'open') return '';
  const until = statusUntil && `Until ${dayName(statusUntil)}.`;
  return [statusReason, until].filter(Boolean).join('. ') || 'Ask the fishery.';
}
