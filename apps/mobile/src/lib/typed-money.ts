import { MOST_PENCE } from '@mereward/shared/money/money';
import { z } from 'zod';

const AMOUNT = /^£?\s*(\d{1,8})(?:[.,](\d{1,2}))?$/;

/** Whole pence in what was typed: "28", "28.5", "£28.50"; null when it is no amount. Thousands are typed without a mark. */
export function penceTyped(text: string): number | null {
  const found = AMOUNT.exec(text.trim());
  if (!found) return null;
  const [, pounds = '', hundredths = ''] = found;
  const pence = Number(pounds) * 100 + Number(hundredths.padEnd(2, '0'));
  return pence <= MOST_PENCE ? pence : null;
}

/** Pence as one would type them: "28.00". */
export const typedPounds = (pence: number): string =>
  `${String(Math.floor(pence / 100))}.${String(pence % 100).padStart(2, '0')}`;

/** An amount typed as text, in whole pence; refused in words when it is none. */
export const typedPence = (what: string) =>
  z.string().transform((text, context): number => {
    const pence = penceTyped(text);
    if (pence !== null) return pence;
    context.issues.push({ code: 'custom', message: `${what} is an amount like 28.00`, input: text });
    return z.NEVER;
  });
