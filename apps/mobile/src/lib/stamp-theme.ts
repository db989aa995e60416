import type { ThemeName } from '@/constants/colours';

/** The theme is stamped on the browser's page; a phone's own system has none. */
export function useStampedTheme(_name: ThemeName): void {}
