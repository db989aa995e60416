import { useState } from 'react';
import { PICTURE_CAUTION, TRACING_PX } from '@mereward/shared/lakes/picture-contract';
import { Field } from '@/components/field';
import { PictureFrame } from '@/features/files/picture-frame';
import { usePickedPicture } from '@/features/files/use-picked-picture';
import { sendLakePicture } from '@/features/lakes/picture-api';

/** Adds a picture to trace a lake over. */
export function PictureForm({ lakeId }: { lakeId: string }) {
  const [caption, setCaption] = useState('');
  const picked = usePickedPicture({
    longestPx: TRACING_PX,
    send: (sending) => sendLakePicture({ ...sending, lakeId, caption: caption.trim() }),
    onSent: () => setCaption(''),
  });
  return (
    <PictureFrame
      label="Add a picture"
      caution={{ title: 'Whose picture is it?', words: PICTURE_CAUTION }}
      thing="picture"
      picked={picked}
    >
      <Field
        label="What it is"
        hint="Whose, and when it was taken: “our drone, May 2026”."
        value={caption}
        onChange={setCaption}
        optional
      />
    </PictureFrame>
  );
}
