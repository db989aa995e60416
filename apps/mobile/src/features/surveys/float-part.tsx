import type { VisitView } from '@mereward/shared/surveys/contract';
import { View } from 'react-native';
import { FormChoice } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { space } from '@/constants/layout';
import { CastPart } from '@/features/surveys/cast-part';
import { spacingWords } from '@/features/surveys/spacing-words';
import type { CastFormState } from '@/features/surveys/use-cast-form';

const SIGHT = [
  { key: 'good', label: 'seen well' },
  { key: 'poor', label: 'seen poorly' },
] as const;

/** Depth by float: pulls as counted, and a second reading. */
export function FloatPart({ form, visit }: { form: CastFormState; visit: VisitView }) {
  const counted = form.watch('pulls').trim() !== '';
  return (
    <CastPart>
      <View style={{ flexDirection: 'row', gap: space.medium }}>
        <View style={{ flex: 1 }}>
          <FormField
            control={form.control}
            name="pulls"
            label={`Float, pulls of ${spacingWords(visit.kit.pullM)}`}
            keypad="decimal"
            bank
          />
        </View>
        <View style={{ flex: 1 }}>
          <FormField control={form.control} name="pullsAgain" label="Read again" keypad="decimal" bank />
        </View>
      </View>
      {counted ? (
        <FormChoice control={form.control} name="floatSight" label="The float" choices={SIGHT} columns={2} />
      ) : null}
    </CastPart>
  );
}
