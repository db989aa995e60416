import { useFonts } from 'expo-font';
import { SourceSans3_400Regular } from '@expo-google-fonts/source-sans-3/400Regular';
import { SourceSans3_600SemiBold } from '@expo-google-fonts/source-sans-3/600SemiBold';

/** Loads the face on a phone's own system; true once it is there, or cannot be had. */
export function useFaces(): boolean {
  const [loaded, fault] = useFonts({ SourceSans3_400Regular, SourceSans3_600SemiBold });
  return loaded || fault !== null;
}
