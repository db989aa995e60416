import type { Control } from 'react-hook-form';
import { FormSelect } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { FormPart } from '@/components/form-part';
import type { VisitRead, VisitTyped } from '@/features/surveys/visit-draft';

const FORCES = [
  { key: '', label: 'not noted' },
  { key: '0', label: '0, smoke rises straight' },
  { key: '1', label: '1, smoke drifts' },
  { key: '2', label: '2, leaves rustle' },
  { key: '3', label: '3, twigs move; casts drift' },
  { key: '4', label: '4, branches move, dust lifts' },
  { key: '5', label: '5, small trees sway' },
  { key: '6', label: '6, large branches move' },
  { key: '7', label: '7, whole trees move' },
  { key: '8', label: '8, twigs break' },
] as const;
const QUARTERS = [
  { key: '', label: 'not noted' },
  { key: 'N', label: 'north' },
  { key: 'NE', label: 'north-east' },
  { key: 'E', label: 'east' },
  { key: 'SE', label: 'south-east' },
  { key: 'S', label: 'south' },
  { key: 'SW', label: 'south-west' },
  { key: 'W', label: 'west' },
  { key: 'NW', label: 'north-west' },
] as const;

/** Wind, clarity and weed of the day: what a later reader asks when two surveys differ. */
export function WeatherPart({ control }: { control: Control<VisitTyped, unknown, VisitRead> }) {
  return (
    <FormPart
      control={control}
      title="Weather, water and weed"
      names={['weatherNote', 'clarity', 'weedState']}
    >
      <FormSelect control={control} name="windForce" label="Wind, Beaufort" choices={FORCES} bank />
      <FormSelect control={control} name="windFrom" label="Wind from" choices={QUARTERS} bank />
      <FormField control={control} name="weatherNote" label="Weather" optional bank />
      <FormField control={control} name="clarity" label="Clarity of the water" optional bank />
      <FormField control={control} name="weedState" label="Weed" optional bank />
    </FormPart>
  );
}
