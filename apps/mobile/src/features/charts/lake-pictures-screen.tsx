import { useState } from 'react';
import { useLocalSearchParams } from 'expo-router';
import type { LakePictureView } from '@mereward/shared/lakes/picture-contract';
import { Image, View } from 'react-native';
import { Button } from '@/components/button';
import { Confirm } from '@/components/confirm';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { StatusShape } from '@/components/status-shape';
import { Text } from '@/components/text';
import { radius, space } from '@/constants/layout';
import { OfficeLakePage } from '@/features/charts/office-lake-page';
import { useLakePictures, usePictureUrl, useRemoveLakePicture } from '@/features/lakes/picture-api';
import { PictureForm } from '@/features/lakes/picture-form';
import { useUnits } from '@/hooks/use-units';
import { length } from '@/lib/format';

const TILE_PX = 260;

/** Pictures from above to trace a lake's outline over. */
export function LakePicturesScreen() {
  const { lakeId } = useLocalSearchParams<{ lakeId: string }>();
  return (
    <OfficeLakePage title="Pictures to trace over" may="change">
      {() => <Pictures lakeId={lakeId} />}
    </OfficeLakePage>
  );
}

function Pictures({ lakeId }: { lakeId: string }) {
  const pictures = useLakePictures(lakeId);
  const [doomed, setDoomed] = useState<LakePictureView | null>(null);
  const removal = useRemoveLakePicture(lakeId);
  return (
    <>
      <Section
        title="Pictures"
        note="A picture from above, two or more places on it that you know, and the shore can be traced over it."
        bare
      >
        <Loaded
          query={pictures}
          waiting="Reading the pictures…"
          empty={{
            when: ({ pictures: all }) => all.length === 0,
            show: <Text tone="inkSoft">No picture yet. Add one below.</Text>,
          }}
        >
          {({ pictures: all }) => (
            <View role="list" style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.large }}>
              {all.map((picture) => (
                <Tile key={picture.id} picture={picture} onRemove={() => setDoomed(picture)} />
              ))}
            </View>
          )}
        </Loaded>
        <ProblemNote problem={removal.error} />
      </Section>
      <Section title="Add a picture">
        <PictureForm lakeId={lakeId} />
      </Section>
      <Confirm
        open={doomed !== null}
        title="Take this picture away?"
        words="It is gone with its known points, for good. An outline traced over it stays as it is."
        act="Take it away"
        danger
        busy={removal.isPending}
        onClose={() => setDoomed(null)}
        onAct={() => {
          if (doomed) removal.mutate(doomed.id, { onSettled: () => setDoomed(null) });
        }}
      />
    </>
  );
}

function Tile({ picture, onRemove }: { picture: LakePictureView; onRemove: () => void }) {
  const { id, lakeId, caption, state, refusal, placed, points } = picture;
  const units = useUnits();
  const small = usePictureUrl(picture, 'small');
  const about = caption || 'Picture without a name';
  return (
    <View role="listitem" style={{ width: TILE_PX, gap: space.small }}>
      {small.data ? (
        <Image
          source={{ uri: small.data }}
          role="img"
          aria-label={about}
          resizeMode="cover"
          style={{ width: TILE_PX, height: (TILE_PX * 3) / 4, borderRadius: radius.control }}
        />
      ) : null}
      <Text weight="semibold">{about}</Text>
      {state === 'waiting' ? <StatusShape shape="ring" tone="water" word="being turned and resized" /> : null}
      {state === 'refused' ? (
        <>
          <StatusShape shape="cross" tone="brick" word="refused" />
          <Text>{refusal ?? ''}</Text>
        </>
      ) : null}
      {state === 'ready' && placed ? (
        <StatusShape
          shape="triangle"
          tone="reed"
          word={`placed by ${String(points.length)} points, RMS ${length(placed.rmsM, units, 2)}`}
        />
      ) : null}
      {state === 'ready' && !placed ? (
        <StatusShape shape="diamond" tone="amber" word="not placed yet: set its known points" />
      ) : null}
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        {state === 'ready' ? (
          <LinkButton label="Known points" href={`/office/lakes/${lakeId}/pictures/${id}`} />
        ) : null}
        {placed ? (
          <LinkButton label="Trace over it" href={`/office/lakes/${lakeId}/outline?pictureId=${id}`} />
        ) : null}
        <Button label="Take away" kind="quiet" spoken={`Take away: ${about}`} onPress={onRemove} />
      </View>
    </View>
  );
}
