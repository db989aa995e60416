import { useState } from 'react';
import type { DisagreementForReview } from '@mereward/shared/charts/disagreement';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Field } from '@/components/field';
import { ProblemNote } from '@/components/problem-note';
import { space } from '@/constants/layout';
import { useTakeBack } from './disagreement-api';

/** Takes back that a report was accepted, with a reason the angler reads. */
export function TakeBack({ report: { id, lakeId, pegNumber } }: { report: DisagreementForReview }) {
  const [open, setOpen] = useState(false);
  const [reason, setReason] = useState('');
  const takeBack = useTakeBack({ lakeId, id });
  if (!open)
    return (
      <View style={{ flexDirection: 'row' }}>
        <Button
          label="Take it back…"
          spoken={`Take it back: peg ${pegNumber}…`}
          kind="quiet"
          onPress={() => setOpen(true)}
        />
      </View>
    );
  return (
    <View style={{ gap: space.medium }}>
      <Field
        label="Why it is taken back"
        hint="The angler reads it. It counts in no chart built from now on; published ones stay, and a draft made with it must be built again."
        value={reason}
        onChange={setReason}
        lines={2}
      />
      <ProblemNote problem={takeBack.error} />
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        <Button
          label="Take it back"
          kind="main"
          busy={takeBack.isPending}
          busyLabel="Taking it back…"
          disabled={reason.trim() === ''}
          onPress={() => takeBack.mutate({ reason: reason.trim() })}
        />
        <Button label="Leave it accepted" kind="quiet" onPress={() => setOpen(false)} />
      </View>
    </View>
  );
}
