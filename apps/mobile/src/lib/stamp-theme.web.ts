import { useEffect } from 'react';
import type { ThemeName } from '@/constants/colours';

/** Tells the page's own style sheet which theme is in force: paper, scroll bars, focus ring. */
export function useStampedTheme(name: ThemeName): void {
  useEffect(() => {
    document.documentElement.dataset['theme'] = name;
  }, [name]);
}
