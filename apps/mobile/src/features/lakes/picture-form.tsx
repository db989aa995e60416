import { useState } from 'react';
import { PHOTO_MOST_BYTES } from '@mereward/shared/files/contract';
import { PICTURE_CAUTION, TRACING_PX } from '@mereward/shared/lakes/picture-contract';
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
import { pickPicture, shrunk } from '@/features/files/pick-picture';
import { sendLakePicture } from '@/features/lakes/picture-api';
import { figure } from '@/lib/format';
import { newId } from '@/lib/new-id';
import type { PickedPicture } from '@/lib/picked';

const MEGABYTE = 1024 * 1024;

/** Adds a picture to trace over: the caution where it is picked, how much of it has gone, refusals in words. */
export function PictureForm({ lakeId }: { lakeId: string }) {
  const [picture, setPicture] = useState<PickedPicture | null>(null);
  const [id, setId] = useState(newId);
  const [caption, setCaption] = useState('');
  const [share, setShare] = useState(0);
  const sending = useMutation({
    mutationFn: (chosen: PickedPicture) =>
      sendLakePicture({ lakeId, id, caption: caption.trim(), picture: chosen, onShare: setShare }),
    onSuccess: () => {
      setPicture(null);
      setCaption('');
      setShare(0);
      setId(newId());
    },
  });
  const picking = useMutation({
    mutationFn: async () => {
      const chosen = await pickPicture();
      return chosen && shrunk(chosen, TRACING_PX);
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
    <Form label="Add a picture" onSubmit={send}>
      <Note kind="caution" title="Whose picture is it?">
        {PICTURE_CAUTION}
      </Note>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small, alignItems: 'center' }}>
        <Button
          label={picture ? 'Choose another' : 'Choose a picture'}
          busy={picking.isPending}
          busyLabel="Opening…"
          onPress={() => picking.mutate()}
        />
        {picture ? <Text>{`${picture.name}, ${figure(picture.file.size / MEGABYTE, 1)} MB`}</Text> : null}
      </View>
      <ProblemNote problem={picking.error} />
      {tooLarge ? (
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
          <Field
            label="What it is"
            hint="Whose, and when it was taken: “our drone, May 2026”."
            value={caption}
            onChange={setCaption}
            optional
          />
          {sending.isPending ? (
            <Progress
              label={share < 1 ? 'Sending the picture' : 'All of it has gone; waiting for the answer'}
              share={share}
            />
          ) : null}
          <ProblemNote problem={sending.error} />
          <View style={{ alignItems: 'flex-start' }}>
            <Button
              label="Send the picture"
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
