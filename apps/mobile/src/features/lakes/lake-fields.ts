import { LakeDetails } from '@mereward/shared/lakes/contract';
import { z } from 'zod';
import type { Choice } from '@/components/choice-props';
import { typedNumber, typedNumberOrNothing } from '@/lib/typed-schemas';

/** A lake's details as they are typed, without its outline, which is drawn. */
export const TypedLake = LakeDetails.omit({ outline: true, outlineFrom: true }).extend({
  name: z.string().trim().min(1, 'Give the lake its name.').max(120, 'At most 120 letters.'),
  maxPeople: typedNumberOrNothing({ what: 'Most people', min: 0, max: 2000 }).pipe(
    z.int('A whole number of people.').nullable(),
  ),
  maxRods: typedNumberOrNothing({ what: 'Most rods', min: 0, max: 5000 }).pipe(
    z.int('A whole number of rods.').nullable(),
  ),
  datumM: typedNumber({ what: 'Chart datum', min: -100, max: 9000, unit: 'm' }),
  maxGapM: typedNumber({ what: 'The gap', min: 2, max: 15, unit: 'm' }),
  longestCastM: typedNumber({ what: 'The longest cast', min: 10, max: 250, unit: 'm' }),
});
export type TypedLake = z.input<typeof TypedLake>;

export const NEW_LAKE: TypedLake = {
  name: '',
  kind: 'gravel_pit',
  nights: false,
  maxPeople: '',
  maxRods: '',
  stockClass: 'improved',
  ownership: 'owned',
  designations: '',
  publicPathBeside: false,
  inflowOutflow: '',
  emergencyAccess: '',
  phoneSignal: '',
  datumM: '',
  maxGapM: '8',
  longestCastM: '100',
  audiences: { depth: 'public', bottom: 'members', spots: 'members', soundings: 'staff' },
};

const text = (value: number | null): string => (value === null ? '' : String(value));

/** A lake's details laid into the form. */
export function typedLake({ outline: _drawn, outlineFrom: _found, ...details }: LakeDetails): TypedLake {
  return {
    ...details,
    maxPeople: text(details.maxPeople),
    maxRods: text(details.maxRods),
    datumM: text(details.datumM),
    maxGapM: text(details.maxGapM),
    longestCastM: text(details.longestCastM),
  };
}

export const LAKE_KINDS: readonly Choice<LakeDetails['kind']>[] = [
  { key: 'gravel_pit', label: 'Gravel working' },
  { key: 'estate_lake', label: 'Estate lake' },
  { key: 'farm_pond', label: 'Farm pond' },
  { key: 'reservoir', label: 'Reservoir' },
  { key: 'canal_section', label: 'Canal section' },
  { key: 'river_section', label: 'River section' },
  { key: 'purpose_dug', label: 'Dug for fishing' },
];

export const STOCK_CLASSES: readonly Choice<LakeDetails['stockClass']>[] = [
  { key: 'natural', label: 'Natural', note: 'lives off the water' },
  { key: 'improved', label: 'Improved', note: 'some stocked' },
  { key: 'intensive', label: 'Intensive', note: 'fed by anglers' },
];

export const OWNERSHIPS: readonly Choice<LakeDetails['ownership']>[] = [
  { key: 'owned', label: 'Owned' },
  { key: 'leased', label: 'Leased' },
  { key: 'shared', label: 'Shared' },
];

export const AUDIENCES: readonly Choice<LakeDetails['audiences']['depth']>[] = [
  { key: 'public', label: 'Everybody', note: 'strangers too' },
  { key: 'ticket', label: 'Ticket', note: 'at that peg, in its hours' },
  { key: 'members', label: 'Members', note: 'and staff, always' },
  { key: 'staff', label: 'Staff', note: 'nobody else' },
];

export const LAYERS: readonly {
  name: keyof LakeDetails['audiences'];
  label: string;
  hint: string;
}[] = [
  { name: 'depth', label: 'Depth', hint: 'Tints, isobaths, sections and the depth today.' },
  { name: 'bottom', label: 'Bottom', hint: 'What the bed is made of and what grows on it.' },
  {
    name: 'spots',
    label: 'Spots',
    hint: 'The places reached from each peg, in wraps and by far-bank mark.',
  },
  { name: 'soundings', label: 'Casts as points', hint: 'Where each cast fell. Raw casts stay with staff.' },
];
