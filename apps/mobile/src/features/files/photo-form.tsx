import { useState } from 'react';
import { PHOTO_CAUTION, PHOTO_MOST_BYTES } from '@mereward/shared/files/contract';
import { useMutation } from '@tanstack/react-query';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Field } from '@/components/field';
import { Form } from '@/components/form';
import { Note } from '@/components/note';
import { ProblemNote } from '@/components/problem-note';
import { Progress } from '@/components/progress';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { sendPhoto, type PhotoSubject } from '@/features/files/photo-api';
import { pickPicture, shrunk } from '@/features/files/pick-picture';
import { figure } from '@/lib/format';
import { newId } from '@/lib/new-id';
import type { PickedPicture } from '@/lib/picked';
import { queryClient } from '@/lib/queries';

const megabytes = ({ file }: PickedPicture): string => `${figure(file.size / 1024 / 1024, 1)} MB`;
const MOST_MB = PHOTO_MOST_BYTES / 1024 / 1024;

type Props = { subject: PhotoSubject; alsoRead: readonly unknown[] };

/** Adds a photo: the caution where it is picked, caption and day, how much of it has gone, refusals in words. */
export function PhotoForm({ subject, alsoRead }: Props) {
  const [picture, setPicture] = useState<PickedPicture | null>(null);
  const [id, setId] = useState(newId);
  const [caption, setCaption] = useState('');
  const [takenOn, setTakenOn] = useState('');
  const [share, setShare] = useState(0);
  const afresh = (): void => {
    setPicture(null);
    setCaption('');
    setTakenOn('');
    setShare(0);
    setId(newId());
  };
  const sending = useMutation({
    mutationFn: (chosen: PickedPicture) =>
      sendPhoto({
        subject,
        photo: { id, caption: caption.trim(), takenOn: takenOn || null, picture: chosen },
        onShare: setShare,
      }),
    onSuccess: () => {
      afresh();
      return queryClient.invalidateQueries({ queryKey: alsoRead });
    },
  });
  const picking = useMutation({
    mutationFn: async () => {
      const chosen = await pickPicture();
      return chosen && shrunk(chosen);
    },
    onSuccess: (chosen) => {
      if (!chosen) return;
      sending.reset();
      setId(newId());
      setPicture(chosen);
    },
  });
  const tooLarge = picture !== null && picture.file.size > PHOTO_MOST_BYTES;
  const send = (): void => {
    if (picture && !tooLarge && !sending.isPending) sending.mutate(picture);
  };
  return (
    <Form label="Add a photo" onSubmit={send}>
      <Note kind="caution" title="Look at it first">
        {PHOTO_CAUTION}
      </Note>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small, alignItems: 'center' }}>
        <Button
          label={picture ? 'Choose another' : 'Choose a photo'}
          busy={picking.isPending}
          busyLabel="Opening…"
          onPress={() => picking.mutate()}
        />
        {picture ? <Text>{`${picture.name}, ${megabytes(picture)}`}</Text> : null}
      </View>
      <ProblemNote problem={picking.error} />
      {tooLarge ? (
        <Note kind="danger" title={`${picture.name} is larger than ${String(MOST_MB)} MB`} live>
          Choose a smaller one, or make this one smaller. Nothing was sent.
        </Note>
      ) : null}
      {picture && !tooLarge ? (
        <>
          <Field
            label="Caption"
            hint="What it shows: “from the origin mark towards M3”."
            value={caption}
            onChange={setCaption}
            optional
          />
          <Field label="Taken on" picker="date" value={takenOn} onChange={setTakenOn} optional />
          {sending.isPending ? (
            <Progress
              label={share < 1 ? 'Sending the photo' : 'All of it has gone; waiting for the answer'}
              share={share}
            />
          ) : null}
          <ProblemNote problem={sending.error} />
          <View style={{ alignItems: 'flex-start' }}>
            <Button
              label="Send the photo"
              kind="main"
              busy={sending.isPending}
              busyLabel="Sending…"
              onPress={send}
            />
          </View>
        </>
      ) : null}
    </Form>
  );
}
