import { useState } from 'react';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Note } from '@/components/note';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { storage } from '@/lib/storage';

/** Said once a visit, where the casting is done. */
export function CastCautions({ visitId }: { visitId: string }) {
  const key = `mereward.cast-cautions.${visitId}`;
  const [read, setRead] = useState(() => storage.peek(key) !== null);
  if (read) return null;
  return (
    <Note kind="caution" title="Before you cast">
      <View style={{ gap: space.small }}>
        <Text>Take the marker out before you fish.</Text>
        <Text>
          Look up for power lines and behind you for people. Pronged leads lock in weed: use a smooth lead
          first; strong line, gloves, never wrap line round your hand, and stand aside when pulling.
        </Text>
        <Text>Alone by deep water? Tell someone where you are and when you will be back.</Text>
        <View style={{ alignItems: 'flex-start' }}>
          <Button
            label="Read"
            bank
            onPress={() => {
              void storage.set(key, 'read');
              setRead(true);
            }}
          />
        </View>
      </View>
    </Note>
  );
}
