/** A colour in OKLCH: lightness 0–1, chroma, hue in degrees. */
export type Oklch = { lightness: number; chroma: number; hueDeg: number };

const toByte = (linear: number): number => {
  const share = linear <= 0.0031308 ? 12.92 * linear : 1.055 * linear ** (1 / 2.4) - 0.055;
  return Math.round(255 * Math.min(1, Math.max(0, share)));
};

const toLinear = (byte: number): number => {
  const share = byte / 255;
  return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
};

const hexByte = (byte: number): string => byte.toString(16).padStart(2, '0').toUpperCase();

/** `#RRGGBB` of an OKLCH colour, cut off at the edge of sRGB. Source: Ottosson 2020, "A perceptual color space". */
export function hexOf({ lightness, chroma, hueDeg }: Oklch): string {
  const a = chroma * Math.cos((hueDeg * Math.PI) / 180);
  const b = chroma * Math.sin((hueDeg * Math.PI) / 180);
  const long = (lightness + 0.3963377774 * a + 0.2158037573 * b) ** 3;
  const medium = (lightness - 0.1055613458 * a - 0.0638541728 * b) ** 3;
  const short = (lightness - 0.0894841775 * a - 1.291485548 * b) ** 3;
  const red = 4.0767416621 * long - 3.3077115913 * medium + 0.2309699292 * short;
  const green = -1.2684380046 * long + 2.6097574011 * medium - 0.3413193965 * short;
  const blue = -0.0041960863 * long - 0.7034186147 * medium + 1.707614701 * short;
  return `#${[red, green, blue].map((linear) => hexByte(toByte(linear))).join('')}`;
}

function bytesOf(hex: string): readonly [number, number, number] {
  if (!/^#[0-9a-f]{6}$/i.test(hex)) throw new RangeError(`Not a six-digit colour: ${hex}`);
  const at = (from: number) => Number.parseInt(hex.slice(from, from + 2), 16);
  return [at(1), at(3), at(5)];
}

/** Relative luminance of `#RRGGBB`, 0–1. Source: WCAG 2.2, "relative luminance". */
export function luminanceOf(hex: string): number {
  const [red, green, blue] = bytesOf(hex);
  return 0.2126 * toLinear(red) + 0.7152 * toLinear(green) + 0.0722 * toLinear(blue);
}

/** Contrast ratio of two colours, 1–21. Source: WCAG 2.2, "contrast ratio". */
export function contrastOf(one: string, other: string): number {
  const a = luminanceOf(one) + 0.05;
  const b = luminanceOf(other) + 0.05;
  return a > b ? a / b : b / a;
}

/** The colour `share` of the way from one to the other, mixed by byte. */
export function mixed(from: string, to: string, share: number): string {
  const a = bytesOf(from);
  const b = bytesOf(to);
  return `#${a.map((byte, i) => hexByte(Math.round(byte + (b[i]! - byte) * share))).join('')}`;
}
