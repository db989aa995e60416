import { View } from 'react-native';
import { Button } from '@/components/button';
import { Heading } from '@/components/heading';
import { Overlay } from '@/components/overlay';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';

type Props = {
  open: boolean;
  title: string;
  /** What will happen, to whom, and whether it can be undone. */
  words: string;
  /** The act in its own words: "Withdraw the chart", never "OK". */
  act: string;
  danger?: boolean | undefined;
  busy?: boolean | undefined;
  onAct: () => void;
  onClose: () => void;
};

/** Asks before an act that is hard to undo. */
export function Confirm({ open, title, words, act, danger = false, busy, onAct, onClose }: Props) {
  return (
    <Overlay open={open} onClose={onClose} title={title} place="middle">
      <Heading level={2}>{title}</Heading>
      <Text>{words}</Text>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small, justifyContent: 'flex-end' }}>
        <Button label="Leave it" onPress={onClose} />
        <Button label={act} kind={danger ? 'danger' : 'main'} busy={busy} onPress={onAct} />
      </View>
    </Overlay>
  );
}
