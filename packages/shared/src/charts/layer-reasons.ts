import type { LayerNotes } from './contract';

const LAYER_NAMES = { depth: 'Depth', bottom: 'Bottom', spots: 'Spots', soundings: 'Soundings' } as const;

/** "Spots, soundings: shown to this fishery's members." – each reason once, with the layers it is about. */
export function layerReasons(notes: LayerNotes): string[] {
  const byWords = new Map<string, string[]>();
  for (const layer of ['depth', 'bottom', 'spots', 'soundings'] as const) {
    const words = notes[layer];
    if (words === null) continue;
    byWords.set(words, [...(byWords.get(words) ?? []), LAYER_NAMES[layer]]);
  }
  return [...byWords].map(
    ([words, names]) => `${names.join(', ')}: ${words.charAt(0).toLowerCase()}${words.slice(1)}`,
  );
}
