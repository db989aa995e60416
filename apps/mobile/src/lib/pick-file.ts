import { getDocumentAsync } from 'expo-document-picker';
import type { PickedText } from '@/lib/picked';

/** Lets the reader choose a text file of theirs; null when they think better of it. */
export async function pickTextFile(_endings: string): Promise<PickedText | null> {
  const { assets } = await getDocumentAsync({ type: '*/*', copyToCacheDirectory: true });
  const [chosen] = assets ?? [];
  if (!chosen) return null;
  const answer = await fetch(chosen.uri);
  return { name: chosen.name, text: await answer.text() };
}
