import type { ReactNode } from 'react';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Heading } from '@/components/heading';
import { Overlay } from '@/components/overlay';
import { space } from '@/constants/layout';

type Props = { open: boolean; onClose: () => void; title: string; children: ReactNode };

/** Comes up from below on a phone and in from the right on a wide screen, for the thing selected. Esc closes it. */
export function Sheet({ open, onClose, title, children }: Props) {
  return (
    <Overlay open={open} onClose={onClose} title={title} place="edge">
      <View style={{ flexDirection: 'row', alignItems: 'center', gap: space.medium }}>
        <Heading level={2} style={{ flex: 1 }}>
          {title}
        </Heading>
        <Button label="Close" kind="quiet" onPress={onClose} />
      </View>
      {children}
    </Overlay>
  );
}
