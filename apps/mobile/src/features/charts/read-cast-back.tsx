import { useState } from 'react';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { stickWords } from '@mereward/shared/charts/spot-words';
import { readWraps } from '@mereward/shared/units/wraps';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Field } from '@/components/field';
import { Select } from '@/components/select';
import { Stepper } from '@/components/stepper';
import { space } from '@/constants/layout';
import { marksAhead } from '@/features/surveys/marks-ahead';
import { useUnits } from '@/hooks/use-units';
import { CastReadBack } from './cast-read-back';
import type { SaidCast } from './chart-answers-api';

type Props = { lake: LakeView; pegId: string };

/** "14 wraps over the pump-house chimney": what the chart says lies there, for any sticks. */
export function ReadCastBack({ lake, pegId }: Props) {
  const { stickSpacingM } = useUnits();
  const marks = marksAhead(lake, pegId);
  const [typed, setTyped] = useState('');
  const [markId, setMarkId] = useState(marks[0]?.id ?? null);
  const [offsetDeg, setOffsetDeg] = useState(0);
  const [asked, setAsked] = useState<SaidCast | null>(null);
  const [fault, setFault] = useState<string | undefined>(undefined);
  const ask = (): void => {
    const read = readWraps(typed, stickSpacingM);
    setFault(read.ok ? undefined : read.reason);
    if (!read.ok || markId === null) return;
    const { whole, remainderM } = read.wraps;
    setAsked({ wrapsWhole: whole, remainderM, stickSpacingM, markId, offsetDeg });
  };
  return (
    <View style={{ gap: space.medium }}>
      <Field
        label={`Wraps of ${stickWords(stickSpacingM)}`}
        hint="14, 14 + 3 ft or 14 + 0.9 m"
        value={typed}
        onChange={setTyped}
        error={fault}
      />
      <Select
        label="Over the mark"
        unset="Choose a mark"
        choices={marks.map(({ id, details }) => ({ key: id, label: `${details.name} (${details.code})` }))}
        value={markId}
        onChange={setMarkId}
      />
      <Stepper
        label="Beside the mark: − left, + right"
        value={offsetDeg}
        min={-90}
        max={90}
        step={1}
        unit="°"
        onChange={(deg) => setOffsetDeg(deg ?? 0)}
      />
      <View style={{ alignItems: 'flex-start' }}>
        <Button label="Read it off the chart" disabled={markId === null} onPress={ask} />
      </View>
      {asked ? <CastReadBack pegId={pegId} cast={asked} /> : null}
    </View>
  );
}
