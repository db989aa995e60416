import { useState } from 'react';
import { PHOTO_CAUTION } from '@mereward/shared/files/contract';
import { Field } from '@/components/field';
import { sendPhoto, type PhotoSubject } from '@/features/files/photo-api';
import { PictureFrame } from '@/features/files/picture-frame';
import { usePickedPicture } from '@/features/files/use-picked-picture';
import { queryClient } from '@/lib/queries';

type Props = { subject: PhotoSubject; alsoRead: readonly unknown[] };

/** Adds a photo of a peg or a mark, with what it shows and its day; `alsoRead` is what shows it afterwards. */
export function PhotoForm({ subject, alsoRead }: Props) {
  const [caption, setCaption] = useState('');
  const [takenOn, setTakenOn] = useState('');
  const picked = usePickedPicture({
    send: ({ id, picture, onShare }) =>
      sendPhoto({
        subject,
        photo: { id, caption: caption.trim(), takenOn: takenOn || null, picture },
        onShare,
      }),
    onSent: () => {
      setCaption('');
      setTakenOn('');
      return queryClient.invalidateQueries({ queryKey: alsoRead });
    },
  });
  return (
    <PictureFrame
      label="Add a photo"
      caution={{ title: 'Look at it first', words: PHOTO_CAUTION }}
      thing="photo"
      picked={picked}
    >
      <Field
        label="Caption"
        hint="What it shows: “from the origin mark towards M3”."
        value={caption}
        onChange={setCaption}
        optional
      />
      <Field label="Taken on" picker="date" value={takenOn} onChange={setTakenOn} optional />
    </PictureFrame>
  );
}
