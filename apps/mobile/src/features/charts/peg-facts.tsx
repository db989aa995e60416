import type { PegDetails } from '@mereward/shared/lakes/contract';
import { Facts, type Fact } from '@/components/facts';
import { Section } from '@/components/section';
import { useUnits } from '@/hooks/use-units';
import { length } from '@/lib/format';
import { dayName } from '@/lib/format-time';

const barrowWords = { yes: 'yes', no: 'no', unknown: 'not known' } as const;
const stepFreeWords = {
  measured_suitable: 'measured and found suitable',
  assisted: 'with help',
  not_suitable: 'not suitable',
  unknown: 'not looked at yet',
} as const;
const platformWords = { none: 'none', bank: 'natural bank', timber: 'timber', stone: 'stone' } as const;

const counted = (count: number | null, one: string, many = `${one}s`): string | null =>
  count === null ? null : `${String(count)} ${count === 1 ? one : many}`;

/** The way to the peg, and where to leave the car. */
export function GettingThere({ details }: { details: PegDetails }) {
  const { access, parking, stepFree } = details;
  const facts: Fact[] = [
    { term: 'From the car', fact: access.fromParkingM === null ? null : `${String(access.fromParkingM)} m` },
    { term: 'Path', fact: access.surface },
    { term: 'Steepest', fact: access.steepest },
    { term: 'Steps', fact: access.steps === 0 ? 'none' : counted(access.steps, 'step') },
    { term: 'Gates', fact: access.gates },
    { term: 'Barrow', fact: barrowWords[access.barrow] },
    { term: 'In winter', fact: access.winter },
    { term: 'Wheelchair', fact: stepFreeWords[stepFree.kind] },
    { term: 'Measured there', fact: stepFree.facts },
    { term: 'Parking', fact: parking.bay },
    { term: 'Room for', fact: counted(parking.spaces, 'car') },
    { term: 'Walk', fact: counted(parking.walkMinutes, 'minute') },
    { term: 'Vehicles', fact: parking.vehicleLimit },
    { term: 'Car park in winter', fact: parking.winterClosure },
  ];
  return (
    <Section title="Getting there">
      <Facts facts={facts} />
    </Section>
  );
}

/** The peg itself: whose water, what to stand on, how many, what tackle. */
export function ThePeg({ details }: { details: PegDetails }) {
  const units = useUnits();
  const { platform, people, rods, shelters, waterWords, originMark, tackleLimits, longestCastM } = details;
  const size =
    platform.widthM !== null && platform.lengthM !== null
      ? `${length(platform.widthM, units)} × ${length(platform.lengthM, units)}`
      : null;
  const facts: Fact[] = [
    { term: 'Its water', fact: waterWords },
    { term: 'Longest cast', fact: longestCastM === null ? null : length(longestCastM, units, 0) },
    { term: 'Stand at', fact: originMark },
    { term: 'Platform', fact: [platformWords[platform.kind], size].filter(Boolean).join(', ') },
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
  return (
    <Section title="The peg">
      <Facts facts={facts} />
    </Section>
  );
}
