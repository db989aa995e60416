/** The device refuses to keep it and the server gives no answer: it is nowhere but in the form. */
export class NowhereKept extends Error {
  override readonly name = 'NowhereKept';
}
