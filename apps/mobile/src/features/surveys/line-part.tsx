import { useId } from 'react';
import type { VisitView } from '@mereward/shared/surveys/contract';
import { lineAWrapM } from '@mereward/shared/surveys/line-out';
import { useController } from 'react-hook-form';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { FieldError } from '@/components/field-frame';
import { Label } from '@/components/label';
import { StepperEntry } from '@/components/stepper-entry';
import { stepped, typedNumber } from '@/components/stepping';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { CastDraft, REMAINDER_UNITS, typedLineM } from '@/features/surveys/cast-draft';
import { CastPart } from '@/features/surveys/cast-part';
import { spacingWords } from '@/features/surveys/spacing-words';
import type { CastFormState } from '@/features/surveys/use-cast-form';
import { figure } from '@/lib/format';

type Props = { form: CastFormState; visit: VisitView };

const UNIT_NAMES = { ft: 'feet', in: 'inches', mm: 'millimetres' } as const;

/** Line out: whole wraps and what was left over, with its length under them, − and + for the thumb. */
export function LinePart({ form, visit }: Props) {
  const id = useId();
  const wraps = useController({ control: form.control, name: 'wrapsWhole' });
  const rest = useController({ control: form.control, name: 'remainder' });
  const step = (direction: 1 | -1) =>
    wraps.field.onChange(stepped(wraps.field.value ?? 0, direction, { min: 0, max: 120 }));
  const wrapsFault = wraps.fieldState.error?.message;
  const restFault = rest.fieldState.error?.message;
  return (
    <CastPart>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', alignItems: 'center', gap: space.small }}>
        <View style={{ flexDirection: 'row', flexGrow: 1, gap: space.small }}>
          <View>
            <Label id={`${id}-wraps`} words={`Wraps of ${spacingWords(visit.kit.stickSpacingM)}`} />
            <StepperEntry
              id={`${id}-wraps`}
              text={wraps.field.value === null ? '' : String(wraps.field.value)}
              onChange={(text) => wraps.field.onChange(typedNumber(text))}
              onBlur={wraps.field.onBlur}
              invalid={wrapsFault !== undefined}
            />
          </View>
          <View>
            <Label id={`${id}-rest`} words="left over" />
            <View style={{ flexDirection: 'row', alignItems: 'flex-start' }}>
              <StepperEntry
                id={`${id}-rest`}
                text={rest.field.value}
                onChange={rest.field.onChange}
                onBlur={rest.field.onBlur}
                invalid={restFault !== undefined}
              />
              <UnitTurner form={form} />
            </View>
          </View>
        </View>
        <Button label="−" spoken="Wraps: one less" bank onPress={() => step(-1)} />
        <Button label="+" spoken="Wraps: one more" bank onPress={() => step(1)} />
      </View>
      <Text size="small" tone="inkSoft">
        {lineWords(form, visit)}
      </Text>
      {wrapsFault ? <FieldError id={`${id}-wraps`} words={wrapsFault} /> : null}
      {restFault ? <FieldError id={`${id}-rest`} words={restFault} /> : null}
    </CastPart>
  );
}

/** One button that turns through the units; a list would be too small for a wet thumb. */
function UnitTurner({ form }: Pick<Props, 'form'>) {
  const { field } = useController({ control: form.control, name: 'remainderUnit' });
  const next = REMAINDER_UNITS[(REMAINDER_UNITS.indexOf(field.value) + 1) % REMAINDER_UNITS.length] ?? 'ft';
  return (
    <Button
      label={field.value}
      kind="quiet"
      bank
      spoken={`${field.value}, left over in ${UNIT_NAMES[field.value]}: change to ${UNIT_NAMES[next]}`}
      onPress={() => field.onChange(next)}
    />
  );
}

function lineWords(form: CastFormState, { kit }: VisitView): string {
  const read = CastDraft.safeParse(form.watch());
  const lineM = read.success ? typedLineM(read.data, lineAWrapM(kit)) : null;
  const to = kit.wrapReference === 'lead_to_clip' ? 'to the clip' : 'to the rod tip';
  if (lineM === null) return `Whole wraps, lead ${to}`;
  const unmeasured = form.watch('remainder').trim() === '' ? ', left over not measured' : '';
  return `${figure(lineM, 1)} m of line ${to}${unmeasured}`;
}
