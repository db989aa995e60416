import type { VisitView } from '@mereward/shared/surveys/contract';
import { View } from 'react-native';
import { FormChoice } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { space } from '@/constants/layout';
import type { CastFormState } from '@/features/surveys/use-cast-form';
import { sticks } from '@/lib/format';

const SIGHT = [
  { key: 'good', label: 'seen well' },
  { key: 'poor', label: 'seen poorly' },
] as const;

/** Depth by float: pulls as counted, and a second reading. */
export function FloatPart({ form, visit }: { form: CastFormState; visit: VisitView }) {
  return (
    <>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.medium }}>
        <View style={{ flexGrow: 1, minWidth: 150 }}>
          <FormField
            control={form.control}
            name="pulls"
            label={`Float, pulls of ${sticks(visit.kit.pullM)}`}
            hint="As counted"
            keypad="decimal"
            bank
          />
        </View>
        <View style={{ flexGrow: 1, minWidth: 150 }}>
          <FormField
            control={form.control}
            name="pullsAgain"
            label="Pulls, read again"
            hint="Of the same float"
            keypad="decimal"
            optional
            bank
          />
        </View>
      </View>
      <FormChoice control={form.control} name="floatSight" label="The float" choices={SIGHT} columns={2} />
    </>
  );
}
