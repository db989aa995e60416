import { useId, useState } from 'react';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { FieldError } from '@/components/field-frame';
import { Label } from '@/components/label';
import { StepperEntry } from '@/components/stepper-entry';
import { stepped, typedNumber, type StepTerms } from '@/components/stepping';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';

type Props = StepTerms & {
  label: string;
  value: number | null;
  onChange: (value: number | null) => void;
  /** Said after the figure: "wraps", "+ 0 ft". */
  unit?: string | undefined;
  /** A small line under the figure: "51.2 m of line". */
  note?: string | undefined;
  error?: string | undefined;
};

/** − figure +. The figure can also be typed; `min`, `max` and `step` bound the buttons, and typing is checked by the form. */
export function Stepper({ label, value, onChange, unit, note, error, ...terms }: Props) {
  const id = useId();
  const [typed, setTyped] = useState<string | null>(null);
  const move = (direction: 1 | -1): void => {
    setTyped(null);
    onChange(stepped(value, direction, terms));
  };
  const type = (text: string): void => {
    setTyped(text);
    onChange(typedNumber(text));
  };
  return (
    <View style={{ gap: space.hair }}>
      <View style={{ flexDirection: 'row', alignItems: 'center', gap: space.medium }}>
        <View style={{ flex: 1, minWidth: 0 }}>
          <Label id={id} words={label} />
          <View style={{ flexDirection: 'row', alignItems: 'baseline', gap: space.small }}>
            <StepperEntry
              id={id}
              text={typed ?? (value === null ? '' : String(value))}
              onChange={type}
              onBlur={() => setTyped(null)}
              invalid={error !== undefined}
            />
            {unit ? (
              <Text size="lead" tone="inkSoft">
                {unit}
              </Text>
            ) : null}
          </View>
          {note ? (
            <Text size="small" tone="inkSoft">
              {note}
            </Text>
          ) : null}
        </View>
        <Button label="−" spoken={`${label}: one less`} bank onPress={() => move(-1)} />
        <Button label="+" spoken={`${label}: one more`} bank onPress={() => move(1)} />
      </View>
      {error ? <FieldError id={id} words={error} /> : null}
    </View>
  );
}
