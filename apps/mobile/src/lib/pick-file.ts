import { getDocumentAsync } from 'expo-document-picker';
import type { PickedFile, PickedText } from '@/lib/picked';

/** Lets the reader choose a text file of theirs; null when they think better of it. */
export async function pickTextFile(_endings: string): Promise<PickedText | null> {
  const { assets } = await getDocumentAsync({ type: '*/*', copyToCacheDirectory: true });
  const [chosen] = assets ?? [];
  if (!chosen) return null;
  const answer = await fetch(chosen.uri);
  return { name: chosen.name, text: await answer.text() };
}

/** Lets the reader choose several files of theirs, of whatever kind. */
export async function pickFiles(): Promise<PickedFile[]> {
  const { assets } = await getDocumentAsync({ type: '*/*', copyToCacheDirectory: true, multiple: true });
  return Promise.all(
    (assets ?? []).map(async ({ name, uri }) => ({ name, file: await (await fetch(uri)).blob() })),
  );
}
