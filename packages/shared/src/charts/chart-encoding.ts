import type { ClassGrid } from './bottom-map';
import { UNKNOWN_CLASS } from './bottom-map';
import { isSurveyed } from './grid';
import type { Grid, GridFrame } from './grid';

/**
 * Grids as bytes, cells row-major from the south-west; the frame travels beside them.
 * Depth: int16, little end first, whole centimetres (rounded to nearest, so within 5 mm), −32768 not surveyed.
 * σ: uint8 in steps of 2 cm rounded up, so never understated, 254 standing for 5.08 m or more, 255 not surveyed.
 * Classes: two bytes a cell, the class's place in its list (255 unknown), then confidence in 1/250 rounded down.
 */
const NOT_SURVEYED = -32768;
const SIGMA_STEP_M = 0.02;
const SIGMA_UNSURVEYED = 255;
const CONFIDENCE_STEPS = 250;

export function encodeDepth(grid: Grid): Uint8Array {
  const bytes = new Uint8Array(grid.values.length * 2);
  const view = new DataView(bytes.buffer);
  grid.values.forEach((value, i) => {
    const cm = isSurveyed(value) ? Math.max(-32767, Math.min(32767, Math.round(value * 100))) : NOT_SURVEYED;
    view.setInt16(2 * i, cm, true);
  });
  return bytes;
}

export function decodeDepth(bytes: Uint8Array, frame: GridFrame): Grid {
  const count = cellCount(bytes, frame, 2);
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const values = new Float64Array(count);
  for (let i = 0; i < count; i++) {
    const cm = view.getInt16(2 * i, true);
    values[i] = cm === NOT_SURVEYED ? Number.NaN : cm / 100;
  }
  return { ...plainFrame(frame), values };
}

export function encodeSigma(grid: Grid): Uint8Array {
  // A hair is taken off before rounding up, so that a whole step written and read again stays itself.
  return Uint8Array.from(grid.values, (value) =>
    isSurveyed(value) ? Math.min(254, Math.max(0, Math.ceil(value / SIGMA_STEP_M - 1e-9))) : SIGMA_UNSURVEYED,
  );
}

export function decodeSigma(bytes: Uint8Array, frame: GridFrame): Grid {
  cellCount(bytes, frame, 1);
  const values = Float64Array.from(bytes, (steps) =>
    steps === SIGMA_UNSURVEYED ? Number.NaN : (steps * 2) / 100,
  );
  return { ...plainFrame(frame), values };
}

export function encodeClasses(grid: ClassGrid): Uint8Array {
  const bytes = new Uint8Array(grid.classes.length * 2);
  grid.classes.forEach((kind, i) => {
    bytes[2 * i] = kind;
    bytes[2 * i + 1] = kind === UNKNOWN_CLASS ? 0 : Math.floor(grid.confidence[i]! * CONFIDENCE_STEPS + 1e-9);
  });
  return bytes;
}

export function decodeClasses(bytes: Uint8Array, frame: GridFrame): ClassGrid {
  const count = cellCount(bytes, frame, 2);
  const classes = new Uint8Array(count);
  const confidence = new Float64Array(count);
  for (let i = 0; i < count; i++) {
    classes[i] = bytes[2 * i]!;
    confidence[i] = bytes[2 * i + 1]! / CONFIDENCE_STEPS;
  }
  return { ...plainFrame(frame), classes, confidence };
}

function plainFrame({ columns, rows, cellM, originM }: GridFrame): GridFrame {
  return { columns, rows, cellM, originM: { xM: originM.xM, yM: originM.yM } };
}

function cellCount(bytes: Uint8Array, { columns, rows }: GridFrame, bytesACell: number): number {
  const count = columns * rows;
  if (bytes.length !== count * bytesACell) {
    throw new RangeError(
      `A layer of ${columns} × ${rows} cells is ${count * bytesACell} bytes; ${bytes.length} came.`,
    );
  }
  return count;
}

const ALPHABET = 'ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789+/';

/** Base64 of RFC 4648, padded; here because neither Node's nor the browser's own may be used in shared code. */
export function toBase64(bytes: Uint8Array): string {
  const pieces: string[] = [];
  for (let i = 0; i < bytes.length; i += 3) {
    const left = bytes.length - i;
    const word = (bytes[i]! << 16) | ((left > 1 ? bytes[i + 1]! : 0) << 8) | (left > 2 ? bytes[i + 2]! : 0);
    pieces.push(
      ALPHABET[word >> 18]! +
        ALPHABET[(word >> 12) & 63]! +
        (left > 1 ? ALPHABET[(word >> 6) & 63]! : '=') +
        (left > 2 ? ALPHABET[word & 63]! : '='),
    );
  }
  return pieces.join('');
}

const DIGITS = (() => {
  const digits = new Int8Array(128).fill(-1);
  [...ALPHABET].forEach((letter, value) => (digits[letter.charCodeAt(0)] = value));
  return digits;
})();

export function fromBase64(text: string): Uint8Array {
  const padding = text.endsWith('==') ? 2 : text.endsWith('=') ? 1 : 0;
  const letters = text.length - padding;
  if (text.length % 4 !== 0)
    throw new RangeError('This is not base64: its length is not a multiple of four.');
  const bytes = new Uint8Array((text.length / 4) * 3 - padding);
  let word = 0;
  let at = 0;
  for (let i = 0; i < letters; i++) {
    const digit = DIGITS[text.charCodeAt(i)] ?? -1;
    if (digit < 0) throw new RangeError(`This is not base64: letter ${i + 1} does not belong.`);
    word = ((word << 6) | digit) & 0xffffff;
    if (i % 4 === 1) bytes[at++] = (word >> 4) & 255;
    else if (i % 4 === 2) bytes[at++] = (word >> 2) & 255;
    else if (i % 4 === 3) bytes[at++] = word & 255;
  }
  return bytes;
}
