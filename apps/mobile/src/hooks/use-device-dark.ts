import { useColorScheme } from 'react-native';

/** True while the device is set to dark. */
export const useDeviceDark = (): boolean => useColorScheme() === 'dark';
