import { launchImageLibraryAsync } from 'expo-image-picker';
import type { PickedPicture } from '@/lib/picked';

/** Lets the reader choose a picture of theirs; null when they think better of it. */
export async function pickPicture(): Promise<PickedPicture | null> {
  const { assets } = await launchImageLibraryAsync({ mediaTypes: ['images'], quality: 0.85 });
  const [chosen] = assets ?? [];
  if (!chosen) return null;
  const answer = await fetch(chosen.uri);
  return { name: chosen.fileName ?? 'photo.jpg', file: await answer.blob() };
}

/** On a phone's own system the picker has shrunk it already. */
export const shrunk = (picture: PickedPicture, _longestPx?: number): Promise<PickedPicture> =>
  Promise.resolve(picture);
