import { useState } from 'react';
import { useMutation } from '@tanstack/react-query';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Confirm } from '@/components/confirm';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { space } from '@/constants/layout';
import { useOutbox } from '@/lib/outbox';
import { signOut } from '@/lib/session';

/** The way out, here or on every device. */
export function SignOutSection() {
  const [asking, setAsking] = useState(false);
  const leaving = useMutation({ mutationFn: signOut, onSettled: () => setAsking(false) });
  const { entries, locked } = useOutbox();
  const unsent = entries.filter(({ state }) => state !== 'sent').length + locked;
  const stays =
    unsent === 0
      ? ''
      : ` ${unsent === 1 ? 'One thing is' : `${String(unsent)} things are`} not sent yet: sealed on this phone until you sign in here again.`;
  return (
    <Section
      title="Leaving"
      note={`What you read and what you had begun to type is taken off this device.${stays}`}
    >
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        <Button label="Sign out" busy={leaving.isPending} onPress={() => leaving.mutate('here')} />
        <Button label="Sign out everywhere" kind="danger" onPress={() => setAsking(true)} />
      </View>
      <ProblemNote problem={leaving.error} />
      <Confirm
        open={asking}
        title="Sign out everywhere?"
        words="Every phone and browser you are signed in on is signed out at once. What they have not sent yet stays with them until you sign in there again."
        act="Sign out everywhere"
        danger
        busy={leaving.isPending}
        onAct={() => leaving.mutate('everywhere')}
        onClose={() => setAsking(false)}
      />
    </Section>
  );
}
