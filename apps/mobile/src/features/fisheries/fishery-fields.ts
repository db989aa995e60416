import { FisheryDetails } from '@mereward/shared/fisheries/contract';
import { z } from 'zod';
import type { Choice } from '@/components/choice-props';
import { positionText, typedPosition } from '@/lib/position-text';

/** What a fishery tells about itself, as it is typed. */
export const TypedFishery = FisheryDetails.extend({
  name: z.string().trim().min(1, 'Give the fishery its name.').max(120, 'At most 120 letters.'),
  position: typedPosition('Type the latitude and longitude of the lodge or the gate'),
});
export type TypedFishery = z.input<typeof TypedFishery>;
export type HoldsFishery = { details: TypedFishery };

/** A new fishery's form; the zone is the one this device is in. */
export const newFishery = (zone: string): TypedFishery => ({
  name: '',
  legalEntity: '',
  address: '',
  postcode: '',
  gridReference: '',
  position: '',
  jurisdiction: 'ENG',
  zone,
  vatStatus: 'not_registered',
  vatNumber: '',
  officeContact: '',
  dutyPhone: '',
  meetingPoint: '',
  opening: '',
  facilities: '',
  conduct: '',
  gateCode: '',
});

export const typedFishery = (details: FisheryDetails): TypedFishery => ({
  ...details,
  position: positionText(details.position),
});

export const JURISDICTIONS: readonly Choice<FisheryDetails['jurisdiction']>[] = [
  { key: 'ENG', label: 'England' },
  { key: 'WAL', label: 'Wales' },
  { key: 'SCO', label: 'Scotland' },
  { key: 'NIR', label: 'Northern Ireland' },
  { key: 'IRL', label: 'Ireland' },
  { key: 'FRA', label: 'France' },
  { key: 'other', label: 'Elsewhere' },
];

export const VAT_STATES: readonly Choice<FisheryDetails['vatStatus']>[] = [
  { key: 'registered', label: 'Registered' },
  { key: 'not_registered', label: 'Not registered' },
  { key: 'exempt_body', label: 'Exempt body' },
];
