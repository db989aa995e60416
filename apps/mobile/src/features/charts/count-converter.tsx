import { useState } from 'react';
import { FOOT_M, YARD_M } from '@mereward/shared/units/length';
import { convertWraps, formatWraps, readWraps, wrapsToMetres } from '@mereward/shared/units/wraps';
import { stickWords } from '@mereward/shared/charts/spot-words';
import { View } from 'react-native';
import { Field } from '@/components/field';
import { Select } from '@/components/select';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { useUnits } from '@/hooks/use-units';
import { length } from '@/lib/format';

/** Spacings in use besides the usual rod's length. */
const SPACINGS = [
  { key: '12ft', spacingM: 12 * FOOT_M },
  { key: '10ft', spacingM: 10 * FOOT_M },
  { key: '13ft', spacingM: 13 * FOOT_M },
  { key: '2m', spacingM: 2 },
  { key: '1yd', spacingM: YARD_M },
] as const;

type Key = (typeof SPACINGS)[number]['key'];

/** Any count or length of line, on the reader's own sticks. */
export function CountConverter() {
  const units = useUnits();
  const [typed, setTyped] = useState('');
  const [from, setFrom] = useState<Key>('12ft');
  const spacingM = SPACINGS.find(({ key }) => key === from)?.spacingM ?? SPACINGS[0].spacingM;
  const read = typed.trim() === '' ? null : readWraps(typed, spacingM);
  return (
    <View style={{ gap: space.medium }}>
      <Field
        label="A count or a length of line"
        hint="Such as 14 + 3 ft, 9 1/3, or 25 m"
        value={typed}
        onChange={setTyped}
        error={read && !read.ok ? read.reason : undefined}
      />
      <Select
        label="Counted on sticks set"
        choices={SPACINGS.map(({ key, spacingM: m }) => ({ key, label: `${stickWords(m)} apart` }))}
        value={from}
        onChange={setFrom}
      />
      {read?.ok ? (
        <Text role="status" size="lead" weight="semibold">
          {`On your sticks, ${stickWords(units.stickSpacingM)} apart: ${formatWraps(
            convertWraps(read.wraps, spacingM, units.stickSpacingM),
            units.length,
            units.stickSpacingM,
          )} wraps. ${length(wrapsToMetres(read.wraps, spacingM), units, 2)} of line.`}
        </Text>
      ) : null}
    </View>
  );
}
