/** Whether the device itself says it has no network. Not the other way about: with one, the server may still be out of reach. */
export const noNetwork = (): boolean => !navigator.onLine;
