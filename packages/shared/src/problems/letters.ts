/** Half of a pair of code units without its other half (Unicode 15, section 3.8): nothing can write it down. */
const HALF_LETTER = /[\uD800-\uDBFF](?![\uDC00-\uDFFF])|(?<![\uD800-\uDBFF])[\uDC00-\uDFFF]/;
/** Signs that steer machines; of them only tab and the ends of lines have a place in words. */
const STEERING = /(?![\t\n\r])\p{Cc}/u;
/**
 * Signs that nobody sees, and that turn the reading order or part what looks like one word: one name could pass for
 * another. The joiners and marks that scripts and pictographs need (U+200C to U+200F) are left alone.
 */
const UNSEEN = /[\u200B\u202A-\u202E\u2060-\u2069\uFEFF\uFFF9-\uFFFB]/;

/** Why these words can't be kept as they are; null when nothing stands against them. */
export function lettersFault(words: string): string | null {
  if (HALF_LETTER.test(words)) return 'A letter is broken in two here. Type it again';
  if (STEERING.test(words))
    return 'There is a sign in it that is no letter. Type it again rather than pasting it';
  if (UNSEEN.test(words))
    return 'There is a sign in it that nobody can see. Type it again rather than pasting it';
  return null;
}
