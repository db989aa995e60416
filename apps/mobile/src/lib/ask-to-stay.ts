/** A phone's own system keeps a program's things without being asked. */
export function askToStay(): void {}
