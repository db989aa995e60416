import { StyleSheet } from 'react-native';
import { colours, type Colours, type ThemeName } from '@/constants/colours';
import { useTheme } from '@/hooks/use-theme';

/**
 * Styles that follow the theme: `const useStyles = themed((c) => ({ card: { backgroundColor: c.sheet } }))`.
 * Each theme's sheet is made once, when it is first wanted.
 */
export function themed<S extends StyleSheet.NamedStyles<S>>(
  build: (colours: Colours) => S & StyleSheet.NamedStyles<S>,
): () => S {
  const made: Partial<Record<ThemeName, S>> = {};
  return () => {
    const { name } = useTheme();
    return (made[name] ??= StyleSheet.create<S>(build(colours[name])));
  };
}
