import type { DeviceDb } from '@/lib/device-rows';

/** The device's own database. A phone's own build has none yet: what is sent there goes at once or not at all. */
export const deviceStore = async (): Promise<DeviceDb | null> => null;
