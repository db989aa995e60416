/** A phone's own screen reader speaks the error as it appears. */
export function focusFirstInvalid(): void {}
