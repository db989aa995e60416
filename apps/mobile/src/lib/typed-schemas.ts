import { z } from 'zod';

type Bounds = { min: number; max: number; unit?: string; what: string };

const words = ({ min, max, unit, what }: Bounds): string =>
  `${what} is a number from ${String(min)} to ${String(max)}${unit ? ` ${unit}` : ''}`;

function typed(text: string): number {
  const plain = text.trim().replace(',', '.').replace('\u2212', '-');
  return /^-?(\d+\.?\d*|\.\d+)$/.test(plain) ? Number(plain) : Number.NaN;
}

/** A number typed as text, as a `Field` gives it: decimal comma allowed; refused in words when it is none or out of bounds. */
export const typedNumber = (bounds: Bounds) =>
  z.string().transform((text, context): number => {
    const value = typed(text);
    if (value >= bounds.min && value <= bounds.max) return value;
    context.issues.push({ code: 'custom', message: words(bounds), input: text });
    return z.NEVER;
  });

/** The same, where nothing typed means nothing known: null. */
export const typedNumberOrNothing = (bounds: Bounds) =>
  z.string().transform((text, context): number | null => {
    if (text.trim() === '') return null;
    const value = typed(text);
    if (value >= bounds.min && value <= bounds.max) return value;
    context.issues.push({ code: 'custom', message: `${words(bounds)}, or nothing`, input: text });
    return z.NEVER;
  });
