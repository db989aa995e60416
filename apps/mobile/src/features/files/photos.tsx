import { useState } from 'react';
import type { PhotoView } from '@mereward/shared/files/contract';
import { Image, View } from 'react-native';
import { Button } from '@/components/button';
import { Confirm } from '@/components/confirm';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { StatusShape } from '@/components/status-shape';
import { Text } from '@/components/text';
import { radius, space } from '@/constants/layout';
import { usePhoto, useRemovePhoto, type PhotoSubject } from '@/features/files/photo-api';
import { PhotoForm } from '@/features/files/photo-form';
import { dayName } from '@/lib/format-time';

const TILE_PX = 200;

type Props = {
  subject: PhotoSubject;
  photos: readonly PhotoView[];
  /** The reading these photos are part of. */
  alsoRead: readonly unknown[];
  /** What a good one shows. */
  note: string;
};

/** The photos of one thing, for those who keep them: how each stands, one more, one away. */
export function Photos({ subject, photos, alsoRead, note }: Props) {
  const [doomed, setDoomed] = useState<PhotoView | null>(null);
  const removal = useRemovePhoto(alsoRead);
  return (
    <Section title="Photos" note={note}>
      {photos.length === 0 ? <Text tone="inkSoft">No photo yet.</Text> : null}
      <View role="list" style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.medium }}>
        {photos.map((photo) => (
          <PhotoTile key={photo.id} photo={photo} onRemove={() => setDoomed(photo)} />
        ))}
      </View>
      <ProblemNote problem={removal.error} />
      <PhotoForm subject={subject} alsoRead={alsoRead} />
      <Confirm
        open={doomed !== null}
        title="Take this photo away?"
        words="It is gone from every page at once, for good."
        act="Take it away"
        danger
        busy={removal.isPending}
        onClose={() => setDoomed(null)}
        onAct={() => {
          if (doomed) removal.mutate(doomed.id, { onSettled: () => setDoomed(null) });
        }}
      />
    </Section>
  );
}

function PhotoTile({ photo: given, onRemove }: { photo: PhotoView; onRemove: () => void }) {
  const { data: photo = given } = usePhoto(given);
  const { caption, takenOn, smallUrl, state, refusal } = photo;
  const about = caption || 'Photo without a caption';
  return (
    <View role="listitem" style={{ width: TILE_PX, gap: space.hair }}>
      {smallUrl ? (
        <Image
          source={{ uri: smallUrl }}
          role="img"
          aria-label={about}
          resizeMode="cover"
          style={{ width: TILE_PX, height: (TILE_PX * 3) / 4, borderRadius: radius.control }}
        />
      ) : null}
      {state === 'waiting' ? (
        <StatusShape shape="ring" tone="water" word="being turned and resized" size="small" />
      ) : null}
      {state === 'refused' ? (
        <>
          <StatusShape shape="cross" tone="brick" word="refused" size="small" />
          <Text size="small">{refusal ?? ''}</Text>
        </>
      ) : null}
      <Text size="small">{about}</Text>
      {takenOn ? (
        <Text size="small" tone="inkSoft">
          {dayName(takenOn)}
        </Text>
      ) : null}
      <View style={{ alignItems: 'flex-start' }}>
        <Button label="Take away" kind="quiet" spoken={`Take away: ${about}`} onPress={onRemove} />
      </View>
    </View>
  );
}
