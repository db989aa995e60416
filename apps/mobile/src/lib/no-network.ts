/** Whether the device itself says it has no network; a phone's own build is not asked. */
export const noNetwork = (): boolean => false;
