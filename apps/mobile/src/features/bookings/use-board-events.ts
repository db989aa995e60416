/** Only browsers keep a stream of events open; elsewhere what is free is read when the screen is opened. */
export function useBoardEvents(_fisheryId: string): void {}
