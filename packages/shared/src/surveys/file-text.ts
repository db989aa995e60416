export type FileText = { ok: true; text: string } | { ok: false; reason: string };

const NOT_UTF8 =
  'This file is not in UTF-8, so letters with accents would come out wrong. In the spreadsheet choose “Save as” and “CSV UTF-8”, then bring that file.';

/**
 * The text of a file a person chose, from its bytes: UTF-8 with or without a mark at its head, or UTF-16 with one.
 * Anything else is refused rather than guessed at, since a wrong guess changes names in silence.
 */
export function readFileText(bytes: Uint8Array): FileText {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return utf16(bytes, 0);
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return utf16(bytes, 1);
  const start = bytes[0] === 0xef && bytes[1] === 0xbb && bytes[2] === 0xbf ? 3 : 0;
  return utf8(bytes, start);
}

const CHUNK = 4096; // code units joined at a time: one call must not get too many arguments

function joined(units: Uint16Array): string {
  let text = '';
  for (let i = 0; i < units.length; i += CHUNK) text += String.fromCharCode(...units.subarray(i, i + CHUNK));
  return text;
}

function utf16(bytes: Uint8Array, highFirst: 0 | 1): FileText {
  if (bytes.length % 2 === 1)
    return { ok: false, reason: 'This file ends in the middle of a letter. Save it again.' };
  const units = new Uint16Array(bytes.length / 2 - 1);
  for (let i = 0; i < units.length; i++) {
    const first = bytes[2 * i + 2] ?? 0;
    const second = bytes[2 * i + 3] ?? 0;
    units[i] = highFirst === 1 ? first * 256 + second : second * 256 + first;
  }
  return { ok: true, text: joined(units) };
}

/** How many bytes follow a leading byte, and the least code point such a sequence may hold (RFC 3629). */
function lead(byte: number): { more: number; bits: number; least: number } | null {
  if (byte < 0x80) return { more: 0, bits: byte, least: 0 };
  if (byte >= 0xc2 && byte < 0xe0) return { more: 1, bits: byte & 0x1f, least: 0x80 };
  if (byte >= 0xe0 && byte < 0xf0) return { more: 2, bits: byte & 0x0f, least: 0x800 };
  if (byte >= 0xf0 && byte < 0xf5) return { more: 3, bits: byte & 0x07, least: 0x10000 };
  return null;
}

function utf8(bytes: Uint8Array, start: number): FileText {
  const units = new Uint16Array(bytes.length - start);
  let length = 0;
  for (let i = start; i < bytes.length;) {
    const head = lead(bytes[i] ?? 0);
    if (!head) return { ok: false, reason: NOT_UTF8 };
    let code = head.bits;
    for (let k = 1; k <= head.more; k++) {
      const next = bytes[i + k] ?? 0;
      if ((next & 0xc0) !== 0x80) return { ok: false, reason: NOT_UTF8 };
      code = code * 64 + (next & 0x3f);
    }
    if (code < head.least || code > 0x10ffff || (code >= 0xd800 && code < 0xe000))
      return { ok: false, reason: NOT_UTF8 };
    if (code < 0x10000) units[length++] = code;
    else {
      units[length++] = 0xd800 + ((code - 0x10000) >> 10);
      units[length++] = 0xdc00 + ((code - 0x10000) & 0x3ff);
    }
    i += head.more + 1;
  }
  return { ok: true, text: joined(units.subarray(0, length)) };
}
