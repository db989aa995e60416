import AsyncStorage from '@react-native-async-storage/async-storage';

/** Small text kept on this device. Losing it costs convenience, never a record. */
export const storage = {
  get: (key: string): Promise<string | null> => AsyncStorage.getItem(key),
  set: (key: string, value: string): Promise<void> => AsyncStorage.setItem(key, value),
  remove: (key: string): Promise<void> => AsyncStorage.removeItem(key),
  keys: async (): Promise<readonly string[]> => AsyncStorage.getAllKeys(),
  /** What can be had without waiting; a phone's own store can only be waited for. */
  peek: (_key: string): string | null => null,
  /** A phone's own program has one window: nobody else changes what it keeps. */
  watch: (_key: string, _changed: (value: string | null) => void): void => {},
};
