const LONGEST_OCTETS = 75;

/** Octets of a code point in UTF-8. */
function octetsOf(letter: string): number {
  const point = letter.codePointAt(0) ?? 0;
  if (point < 0x80) return 1;
  if (point < 0x800) return 2;
  return point < 0x10000 ? 3 : 4;
}

/**
 * A content line with its CRLF, folded so that no line is longer than 75 octets of UTF-8 without its line end: a space
 * begins each further one, and no letter is split. Source: RFC 5545 section 3.1.
 */
export function foldedLine(line: string): string {
  let folded = '';
  let octets = 0;
  for (const letter of line) {
    const more = octetsOf(letter);
    if (octets + more > LONGEST_OCTETS) {
      folded += '\r\n ';
      octets = 1;
    }
    folded += letter;
    octets += more;
  }
  return `${folded}\r\n`;
}

/** What is no letter of a text value: control signs but tab and line feed. */
const STEERING = /(?![\t\n])\p{Cc}/gu;

/** Words as a TEXT value: backslash, semicolon and comma escaped, line ends as \n. Source: RFC 5545 section 3.3.11. */
export const textValue = (words: string): string =>
  words
    .replace(/\r\n?/g, '\n')
    .replace(STEERING, '')
    .replace(/[\\;,]/g, (sign) => `\\${sign}`)
    .replace(/\n/g, '\\n');
