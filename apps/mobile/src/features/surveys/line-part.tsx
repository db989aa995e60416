import type { VisitView } from '@mereward/shared/surveys/contract';
import { lineAWrapM } from '@mereward/shared/surveys/line-out';
import { View } from 'react-native';
import { FormChoice, FormStepper } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { space } from '@/constants/layout';
import { CastDraft, typedLineM } from '@/features/surveys/cast-draft';
import type { CastFormState } from '@/features/surveys/use-cast-form';
import { figure, sticks } from '@/lib/format';

const UNITS = [
  { key: 'ft', label: 'feet' },
  { key: 'm', label: 'metres' },
] as const;

/** Line out: whole wraps and what was left over, with its length beside it. */
export function LinePart({ form, visit }: { form: CastFormState; visit: VisitView }) {
  const read = CastDraft.safeParse(form.watch());
  const lineM = read.success ? typedLineM(read.data, lineAWrapM(visit.kit)) : null;
  const to = visit.kit.wrapReference === 'lead_to_clip' ? 'to the clip' : 'to the rod tip';
  return (
    <>
      <FormStepper
        control={form.control}
        name="wrapsWhole"
        label={`Wraps of ${sticks(visit.kit.stickSpacingM)}, lead ${to}`}
        min={0}
        max={120}
        note={lineM === null ? 'whole wraps' : `${figure(lineM, 1)} m of line`}
      />
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.medium, alignItems: 'flex-end' }}>
        <View style={{ flexGrow: 1, minWidth: 140 }}>
          <FormField
            control={form.control}
            name="remainder"
            label="and left over"
            hint="0 when it came out even; empty when not measured"
            keypad="decimal"
            bank
          />
        </View>
        <View style={{ flexGrow: 1, minWidth: 160 }}>
          <FormChoice control={form.control} name="remainderUnit" label="in" choices={UNITS} columns={2} />
        </View>
      </View>
    </>
  );
}
