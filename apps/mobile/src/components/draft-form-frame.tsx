import type { ReactNode } from 'react';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Form } from '@/components/form';
import { Note } from '@/components/note';
import { ProblemNote } from '@/components/problem-note';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';

type Props = {
  /** What `useDraftForm` gave. */
  form: { submit: () => void; busy: boolean; problem: unknown; restored: boolean; startAfresh: () => void };
  /** Names the form to a screen reader. */
  label: string;
  /** The act in its own words: "Keep the lake". */
  act: string;
  busyLabel: string;
  bank?: boolean | undefined;
  /** Further buttons beside the act. */
  beside?: ReactNode;
  children: ReactNode;
};

/** A draft form on the screen: its fields, what came back from an earlier visit, what went wrong, the one main act. */
export function DraftFormFrame({ form, label, act, busyLabel, bank, beside, children }: Props) {
  return (
    <Form label={label} onSubmit={form.submit}>
      {form.restored ? (
        <Note>
          <Text>What you typed earlier is here again.</Text>
          <View style={{ alignItems: 'flex-start' }}>
            <Button label="Start afresh" kind="quiet" onPress={form.startAfresh} />
          </View>
        </Note>
      ) : null}
      {children}
      <ProblemNote problem={form.problem} />
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        <Button
          label={act}
          kind="main"
          busy={form.busy}
          busyLabel={busyLabel}
          bank={bank}
          onPress={form.submit}
        />
        {beside}
      </View>
    </Form>
  );
}
