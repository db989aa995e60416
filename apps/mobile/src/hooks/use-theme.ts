import { z } from 'zod';
import { colours, type Colours, type ThemeName } from '@/constants/colours';
import { useDeviceDark } from '@/hooks/use-device-dark';
import { createPreference } from '@/lib/preference';

export const ThemeChoice = z.enum(['device', 'light', 'dusk']);
export type ThemeChoice = z.infer<typeof ThemeChoice>;

export const themeChoice = createPreference<ThemeChoice>({
  key: 'mereward.theme',
  schema: ThemeChoice,
  fallback: 'device',
});

/** The theme in force: the reader's choice, or the device's light or dark. */
export function useTheme(): { name: ThemeName; colours: Colours } {
  const choice = themeChoice.use();
  const dark = useDeviceDark();
  const name: ThemeName = choice === 'device' ? (dark ? 'dusk' : 'light') : choice;
  return { name, colours: colours[name] };
}
