/** Asks that the screen stay lit; a phone's own program leaves that to its settings. Answers how to let go. */
export const keepAwake = (): (() => void) => () => undefined;
