/** A stop that has been explained in words for the person at the keyboard: shown without a stack. */
export class Halt extends Error {}
