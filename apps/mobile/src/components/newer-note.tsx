import { View } from 'react-native';
import { Button } from '@/components/button';
import { Note } from '@/components/note';
import { Text } from '@/components/text';

type Props = {
  /** "this lake" */
  what: string;
  onTake: () => void;
};

/** Said over a form when somebody else has changed the thing since it was opened. */
export function NewerNote({ what, onTake }: Props) {
  return (
    <Note kind="caution" title={`Somebody changed ${what} meanwhile`} live>
      <Text>
        What you typed is still here, but can’t be kept over their change. Note down what you need, take
        theirs and make your change again.
      </Text>
      <View style={{ alignItems: 'flex-start' }}>
        <Button label="Take theirs" onPress={onTake} />
      </View>
    </Note>
  );
}
