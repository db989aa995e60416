/** A text file somebody chose. */
export type PickedText = { name: string; text: string };

/** A picture somebody chose, ready to be sent: what a form takes as a file, and its name. */
export type PickedPicture = { name: string; file: Blob };

/** Any file somebody chose, ready to be sent. */
export type PickedFile = { name: string; file: Blob };
