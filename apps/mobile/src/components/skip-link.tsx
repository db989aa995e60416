/** A way past the places is for keyboards on the web; elsewhere there is nothing to skip. */
export const SkipLink = (): null => null;
