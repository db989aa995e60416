import { useWindowDimensions } from 'react-native';
import { THREE_COLUMNS_FROM_PX, WIDE_FROM_PX } from '@/constants/layout';

/** True on a screen wide enough for the rail and for tables (768 px and up). */
export const useWide = (): boolean => useWindowDimensions().width >= WIDE_FROM_PX;

/** True where list, main thing and detail fit side by side. */
export const useThreeColumns = (): boolean => useWindowDimensions().width >= THREE_COLUMNS_FROM_PX;
