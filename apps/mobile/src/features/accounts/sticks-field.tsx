import { useState } from 'react';
import { View } from 'react-native';
import { ChoiceGrid } from '@/components/choice-grid';
import { Field } from '@/components/field';
import { typedNumber } from '@/components/stepping';
import { space } from '@/constants/layout';
import { stickChoices, stickKeyOf, type StickKey } from '@/features/accounts/stick-choices';

type Props = { spacingM: number; onChange: (spacingM: number) => void; error?: string | undefined };

const LEAST_M = 0.3;
const MOST_M = 10;

/** The spacing of the reader's own distance sticks: a common one, or any other in metres. */
export function SticksField({ spacingM, onChange, error }: Props) {
  const [key, setKey] = useState<StickKey>(stickKeyOf(spacingM));
  const [typed, setTyped] = useState(String(spacingM));
  const read = typedNumber(typed);
  const fits = read !== null && read >= LEAST_M && read <= MOST_M;
  const choose = (chosen: StickKey): void => {
    setKey(chosen);
    const spacing = stickChoices.find((choice) => choice.key === chosen)?.spacingM ?? null;
    if (spacing !== null) onChange(spacing);
  };
  const type = (text: string): void => {
    setTyped(text);
    const value = typedNumber(text);
    if (value !== null && value >= LEAST_M && value <= MOST_M) onChange(value);
  };
  return (
    <View style={{ gap: space.medium }}>
      <ChoiceGrid
        label="My distance sticks"
        hint="Spots are told in wraps of your own sticks as well as the fishery’s."
        choices={stickChoices}
        value={key}
        onChange={choose}
        columns={4}
        bank={false}
        error={error}
      />
      {key === 'other' ? (
        <Field
          label="Apart, in metres"
          keypad="decimal"
          value={typed}
          onChange={type}
          error={fits ? undefined : 'Sticks stand 0.3 to 10 m apart'}
        />
      ) : null}
    </View>
  );
}
