import { useState } from 'react';
import type { ClosureView } from '@mereward/shared/closures/deeds-contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Checkbox } from '@/components/checkbox';
import { Confirm } from '@/components/confirm';
import { Field } from '@/components/field';
import { Note } from '@/components/note';
import { ProblemNote } from '@/components/problem-note';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { useLiftClosure } from '@/features/closures/api';

/** Lifts a closure: its conditions are ticked first; what stands against it only the owner may pass over. */
export function LiftPart({ closure }: { closure: ClosureView }) {
  const [ticked, setTicked] = useState<readonly string[]>([]);
  const [reason, setReason] = useState('');
  const [asking, setAsking] = useState(false);
  const lift = useLiftClosure(closure.id);
  const { details, may, legal, version } = closure;
  if (!may.lift)
    return legal && details.until !== null && closure.state === 'in_force' ? (
      <Note>This closure is law: it ends by itself, and nobody here may lift it.</Note>
    ) : null;
  const ticks = details.liftConditions.flatMap((one) => (one.kind === 'tick' ? [one] : []));
  const oxygen = closure.standsAgainstLifting.filter((words) => !ticks.some((one) => one.words === words));
  const standing = oxygen.length + ticks.filter(({ id }) => !ticked.includes(id)).length;
  const mayLift = standing === 0 || (may.override && reason.trim() !== '');
  return (
    <View style={{ gap: space.small }}>
      {ticks.map(({ id, words }) => (
        <Checkbox
          key={id}
          label={words}
          checked={ticked.includes(id)}
          onChange={(on) => setTicked(on ? [...ticked, id] : ticked.filter((each) => each !== id))}
        />
      ))}
      {oxygen.map((words) => (
        <Text key={words} tone="inkSoft">
          Still wanted: {words}
        </Text>
      ))}
      {standing > 0 && may.override ? (
        <Field
          label="Why it is lifted all the same"
          hint="You answer for it as the owner. It is kept with the closure."
          value={reason}
          onChange={setReason}
          lines={2}
        />
      ) : null}
      {standing > 0 && !may.override ? (
        <Text tone="inkSoft">
          {legal
            ? 'It is law: nobody may pass over what is still wanted.'
            : 'Only the owner may lift it before all of this is so.'}
        </Text>
      ) : null}
      <ProblemNote problem={lift.error} />
      <View style={{ alignItems: 'flex-start' }}>
        <Button label="Lift the closure" disabled={!mayLift} onPress={() => setAsking(true)} />
      </View>
      <Confirm
        open={asking}
        title="Open the water again?"
        words="Its pegs can be booked at once and its notice comes down. Whoever has not chosen yet keeps their own ticket, where its time is still to come."
        act="Lift it"
        busy={lift.isPending}
        onClose={() => setAsking(false)}
        onAct={() =>
          lift.mutate(
            { version, ticked: [...ticked], reason: reason.trim() },
            { onSettled: () => setAsking(false) },
          )
        }
      />
    </View>
  );
}
