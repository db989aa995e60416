import type { PhotoView } from '@mereward/shared/lakes/contract';
import { Image, ScrollView, View } from 'react-native';
import { Text } from '@/components/text';
import { radius, space } from '@/constants/layout';
import { dayName } from '@/lib/format-time';

const HEIGHT_PX = 200;

/** Dated photographs from the peg, side by side. */
export function PegPhotos({ photos, title }: { photos: readonly PhotoView[]; title: string }) {
  const ready = photos.filter(({ smallUrl }) => smallUrl !== null);
  if (ready.length === 0) return null;
  return (
    <ScrollView
      horizontal
      role="group"
      aria-label={`Photographs from ${title}`}
      {...{ tabIndex: 0 /* so that arrow keys scroll it */ }}
      contentContainerStyle={{ gap: space.medium }}
    >
      {ready.map(({ id, smallUrl, caption, takenOn, widthPx, heightPx }) => (
        <View key={id} style={{ gap: space.hair }}>
          <Image
            source={{ uri: smallUrl ?? '' }}
            role="img"
            aria-label={caption || `Photograph from ${title}`}
            style={{
              height: HEIGHT_PX,
              width: (HEIGHT_PX * (widthPx ?? 4)) / (heightPx ?? 3),
              borderRadius: radius.control,
            }}
          />
          <Text size="small" tone="inkSoft">
            {[caption, takenOn && dayName(takenOn)].filter(Boolean).join(' · ')}
          </Text>
        </View>
      ))}
    </ScrollView>
  );
}
