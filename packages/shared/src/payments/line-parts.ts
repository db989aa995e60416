import { sumPence } from '../money/money';
import { sharePence } from '../money/sharing';
import { vatOfGross } from '../money/vat';

/** A line of a receipt or a credit note, pence, nought or more. Words and rate together name it within one sale. */
export type SaleLine = { words: string; grossPence: number; rateBp: number; vatPence: number };

/** Lines of the same words and rate made one: “2 × Day ticket”. Their VAT is the sum of what was rounded for each. */
export function saleLines(lines: readonly (SaleLine & { count: number })[]): SaleLine[] {
  const merged = new Map<string, SaleLine & { count: number }>();
  for (const line of lines) {
    const key = `${line.rateBp} ${line.words}`;
    const sum = merged.get(key);
    merged.set(key, {
      ...line,
      count: line.count + (sum?.count ?? 0),
      grossPence: sumPence([line.grossPence, sum?.grossPence ?? 0]),
      vatPence: sumPence([line.vatPence, sum?.vatPence ?? 0]),
    });
  }
  return [...merged.values()].map(({ count, words, ...line }) => ({
    ...line,
    words: count > 1 ? `${count} × ${words}` : words,
  }));
}

/**
 * The lines of a part of a sale: a payment of some of it, or a refund. `had` are the lines of parts before; each line
 * gives by what is left of it, to the penny, and the last part takes exactly what is left, so that all parts together
 * are the sale, VAT and all. Lines that give nothing are left out. Throws RangeError for more than is left.
 */
export function partOfLines(
  whole: readonly SaleLine[],
  had: readonly SaleLine[],
  amountPence: number,
): SaleLine[] {
  const left = whole.map((line) => leftOf(line, had));
  const leftPence = sumPence(left.map(({ grossPence }) => grossPence));
  if (amountPence < 0 || amountPence > leftPence)
    throw new RangeError('That is more than is left of the sale.');
  const parts = sharePence(
    amountPence,
    left.map(({ grossPence }) => grossPence),
  );
  return left.flatMap((line, index) => {
    const grossPence = parts[index] ?? 0;
    return grossPence === 0 ? [] : [{ ...line, grossPence, vatPence: partVat(line, grossPence) }];
  });
}

function leftOf(line: SaleLine, had: readonly SaleLine[]): SaleLine {
  const gone = had.filter(({ words, rateBp }) => words === line.words && rateBp === line.rateBp);
  return {
    ...line,
    grossPence: line.grossPence - sumPence(gone.map(({ grossPence }) => grossPence)),
    vatPence: line.vatPence - sumPence(gone.map(({ vatPence }) => vatPence)),
  };
}

/** The part's own VAT, kept where what then remains still has VAT between nought and its gross. */
function partVat(left: SaleLine, grossPence: number): number {
  const least = Math.max(0, left.vatPence - (left.grossPence - grossPence));
  const most = Math.min(grossPence, left.vatPence);
  if (grossPence === left.grossPence) return left.vatPence;
  return Math.min(most, Math.max(least, vatOfGross(grossPence, left.rateBp)));
}
