import type { ReactNode } from 'react';
import { View } from 'react-native';
import { space } from '@/constants/layout';

type Props = { label: string; onSubmit: () => void; children: ReactNode };

/** A form: on the web Enter in any field submits it, as everywhere. `label` names it to a screen reader. */
export function Form({ label, children }: Props) {
  return (
    <View role="form" aria-label={label} style={{ gap: space.page }}>
      {children}
    </View>
  );
}
