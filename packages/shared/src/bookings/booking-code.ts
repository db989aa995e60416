/** Letters and figures no two of which are read or heard as one another, without vowels: 23, a prime. A 2 is never a Z. */
export const BOOKING_CODE_LETTERS = '234679CDFGHJKMNPQRTVWXY';
export const BOOKING_CODE_LENGTH = 6;
const BASE = BOOKING_CODE_LETTERS.length;
const DRAWN = BOOKING_CODE_LENGTH - 1;

/** How many codes there are: 23⁵. A code is drawn by a number from 0 to one less. */
export const BOOKING_CODES = BASE ** DRAWN;

/**
 * The code of a drawn number: five letters and a sixth that makes Σ place × letter (places 1 to 6) a multiple of 23.
 * Since 23 is prime, any one letter misread and any two swapped give no code. Throws RangeError outside the range.
 * Source: the weighted check of ISBN-10, with 23 in place of 11.
 */
export function bookingCode(drawn: number): string {
  if (!Number.isInteger(drawn) || drawn < 0 || drawn >= BOOKING_CODES)
    throw new RangeError(`A code is drawn by a whole number from 0 to ${BOOKING_CODES - 1}.`);
  const places = Array.from({ length: DRAWN }, (_, index) => Math.floor(drawn / BASE ** index) % BASE);
  const sum = weighed(places);
  const last = Array.from({ length: BASE }, (_, letter) => letter).find(
    (letter) => (sum + BOOKING_CODE_LENGTH * letter) % BASE === 0,
  );
  return [...places, last ?? 0].map((letter) => BOOKING_CODE_LETTERS.charAt(letter)).join('');
}

const weighed = (places: readonly number[]): number =>
  places.reduce((sum, letter, index) => sum + (index + 1) * letter, 0);

/** A code as it was typed or read aloud, in any letters, with spaces or dashes; null when it can’t be one. */
export function readBookingCode(typed: string): string | null {
  const code = typed
    .toUpperCase()
    .replace(/[\s-]+/g, '')
    .replaceAll('Z', '2');
  const places = [...code].map((letter) => BOOKING_CODE_LETTERS.indexOf(letter));
  if (places.length !== BOOKING_CODE_LENGTH || places.includes(-1)) return null;
  return weighed(places) % BASE === 0 ? code : null;
}

/** A code in two halves, as it is shown and read aloud: “7KD MXP”. */
export const bookingCodeWords = (code: string): string => `${code.slice(0, 3)} ${code.slice(3)}`;

/** What a ticket’s QR code says: an address any phone opens, ending in the code. `publicUrl` without a last slash. */
export const ticketQr = (publicUrl: string, code: string): string => `${publicUrl}/t/${code}`;

/** The code in what a phone read off a ticket: an address of ours, or the code alone; null when it is neither. */
export function readTicketQr(text: string): string | null {
  const ending = /^https?:\/\/[^/?#\s]+\/t\/([^/?#]+)\/?$/i.exec(text.trim())?.[1];
  return readBookingCode(ending ?? text);
}
