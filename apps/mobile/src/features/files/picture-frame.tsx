import type { ReactNode } from 'react';
import { PHOTO_MOST_BYTES } from '@mereward/shared/files/contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Form } from '@/components/form';
import { Note } from '@/components/note';
import { ProblemNote } from '@/components/problem-note';
import { Progress } from '@/components/progress';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import type { usePickedPicture } from '@/features/files/use-picked-picture';
import { figure } from '@/lib/format';

const MEGABYTE = 1024 * 1024;

type Props = {
  label: string;
  caution: { title: string; words: string };
  /** What it is called here: "photo", "picture". */
  thing: string;
  picked: ReturnType<typeof usePickedPicture>;
  /** What is asked about the chosen one. */
  children: ReactNode;
};

/** A form that sends one picture: the caution where it is picked, how much of it has gone, refusals in words. */
export function PictureFrame({ label, caution, thing, picked, children }: Props) {
  const { picture, tooLarge, share, picking, sending } = picked;
  return (
    <Form label={label} onSubmit={sending.start}>
      <Note kind="caution" title={caution.title}>
        {caution.words}
      </Note>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small, alignItems: 'center' }}>
        <Button
          label={picture ? 'Choose another' : `Choose a ${thing}`}
          busy={picking.busy}
          busyLabel="Opening…"
          onPress={picking.start}
        />
        {picture ? <Text>{`${picture.name}, ${figure(picture.file.size / MEGABYTE, 1)} MB`}</Text> : null}
      </View>
      <ProblemNote problem={picking.problem} />
      {picture && tooLarge ? (
        <Note
          kind="danger"
          title={`${picture.name} is larger than ${String(PHOTO_MOST_BYTES / MEGABYTE)} MB`}
          live
        >
          Choose a smaller one, or make this one smaller. Nothing was sent.
        </Note>
      ) : null}
      {picture && !tooLarge ? (
        <>
          {children}
          {sending.busy ? (
            <Progress
              label={share < 1 ? `Sending the ${thing}` : 'All of it has gone; waiting for the answer'}
              share={share}
            />
          ) : null}
          <ProblemNote problem={sending.problem} />
          <View style={{ alignItems: 'flex-start' }}>
            <Button
              label={`Send the ${thing}`}
              kind="main"
              busy={sending.busy}
              busyLabel="Sending…"
              onPress={sending.start}
            />
          </View>
        </>
      ) : null}
    </Form>
  );
}
