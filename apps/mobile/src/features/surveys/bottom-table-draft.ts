import { isWhole, type BottomFeel } from '@mereward/shared/surveys/bottom-table-contract';
import type { Cover, Substrate } from '@mereward/shared/surveys/contract';
import { z } from 'zod';

/** One feel's list within one class: which column of the table it is. */
export const FEEL_PARTS = [
  { key: 'drop', label: 'How it lands' },
  { key: 'drag', label: 'How it drags' },
  { key: 'cameBack', label: 'What comes back' },
  { key: 'smell', label: 'Smell' },
] as const;
export type FeelPart = (typeof FEEL_PARTS)[number]['key'];

export type BottomClass = { map: 'substrate'; name: Substrate } | { map: 'cover'; name: Cover };

/** A row's shares as typed, per cent; its feels keep their order. */
export type TypedRow = Readonly<Record<string, string>>;

/** Per cent to two decimals, without empty noughts. */
export const percentText = (share: number): string => String(Number((share * 100).toFixed(2)));

export const rowOf = (
  feel: BottomFeel,
  { map, name }: BottomClass,
  part: FeelPart,
): Record<string, number> => ({
  ...(map === 'substrate' ? feel.substrate.of[name][part] : feel.cover.of[name][part]),
});

export const typedRow = (row: Readonly<Record<string, number>>): TypedRow =>
  Object.fromEntries(Object.entries(row).map(([key, share]) => [key, percentText(share)]));

const LEAST_PERCENT = 0.01;
/** Two decimals a figure leave a row this far from 100 at most; it is then evened out. */
const ROUNDING_PERCENT = 0.1;

const typedPercent = (text: string): number => {
  const plain = text.trim().replace(',', '.');
  return /^(\d+\.?\d*|\.\d+)$/.test(plain) ? Number(plain) : Number.NaN;
};

export type RowRead = { ok: true; shares: Record<string, number> } | { ok: false; words: string };

/**
 * A typed row as shares that add up to 1, or what is wrong with it. A figure nobody touched keeps its digits beyond the two
 * that are shown.
 */
export function readRow(typed: TypedRow, before: Readonly<Record<string, number>>): RowRead {
  const entries = Object.entries(typed).map(([key, text]): [string, number] => {
    const known = before[key];
    const untouched = known !== undefined && percentText(known) === text.trim();
    return [key, untouched ? known : typedPercent(text) / 100];
  });
  if (entries.some(([, share]) => !Number.isFinite(share)))
    return { ok: false, words: 'Every figure is a per cent.' };
  if (entries.some(([, share]) => share * 100 < LEAST_PERCENT))
    return { ok: false, words: `Nothing is impossible at the water: ${LEAST_PERCENT} % at least.` };
  const sum = entries.reduce((total, [, share]) => total + share, 0);
  const offPercent = (sum - 1) * 100;
  if (Math.abs(offPercent) > ROUNDING_PERCENT) {
    const by = Math.abs(offPercent).toFixed(1);
    return {
      ok: false,
      words: `It adds up to ${(sum * 100).toFixed(1)} %: ${by} % ${offPercent > 0 ? 'too much' : 'short'}.`,
    };
  }
  return { ok: true, shares: Object.fromEntries(entries.map(([key, share]) => [key, share / sum])) };
}

/** Rows changed from the table in force, by "map.class.part"; and why. */
export const TableDraft = z.object({
  id: z.string(),
  rows: z.record(z.string(), z.record(z.string(), z.string())),
  fade: z.record(z.string(), z.string()),
  reason: z
    .string()
    .trim()
    .min(1, 'Say why, for whoever looks at it next year.')
    .max(300, 'At most 300 letters.'),
});
export type TableTyped = z.input<typeof TableDraft>;

export const rowKey = ({ map, name }: BottomClass, part: FeelPart): string => `${map}:${name}:${part}`;

export const FADES = [
  { key: 'low_weed', label: 'Low weed' },
  { key: 'tall_weed', label: 'Tall weed' },
  { key: 'leaf_litter', label: 'Leaf litter' },
] as const;

const monthsOf = (text: string | undefined, before: number): number | null => {
  if (text === undefined) return before;
  const months = typedPercent(text);
  return months >= 0.5 && months <= 240 ? months : null;
};

/** The whole table with what was typed put in, or the first thing that is wrong. */
export function editedFeel(
  before: BottomFeel,
  { rows, fade }: Pick<TableTyped, 'rows' | 'fade'>,
  parse: (feel: unknown) => BottomFeel,
): { ok: true; feel: BottomFeel } | { ok: false; words: string } {
  const edited: BottomFeel = structuredClone(before);
  const substrate: Record<string, Record<string, object>> = edited.substrate.of;
  const cover: Record<string, Record<string, object>> = edited.cover.of;
  for (const [key, typed] of Object.entries(rows)) {
    const [map = '', name = '', part = ''] = key.split(':');
    const table = map === 'substrate' ? substrate : cover;
    const known = Object.fromEntries(
      Object.entries(table[name]?.[part] ?? {}).filter(([, share]) => typeof share === 'number'),
    );
    const read = readRow(typed, known);
    if (!read.ok) return { ok: false, words: `${name.replace('_', ' ')}: ${read.words}` };
    const row = table[name];
    if (row && isWhole(Object.values(read.shares))) row[part] = read.shares;
  }
  const months = {
    low_weed: monthsOf(fade['low_weed'], before.fadeMonths.low_weed),
    tall_weed: monthsOf(fade['tall_weed'], before.fadeMonths.tall_weed),
    leaf_litter: monthsOf(fade['leaf_litter'], before.fadeMonths.leaf_litter),
  };
  if (Object.values(months).some((value) => value === null))
    return { ok: false, words: 'A half-life is from half a month to 240 months.' };
  const source = 'The fishery’s own figures';
  return {
    ok: true,
    feel: parse({
      substrate: { ...edited.substrate, source },
      cover: { ...edited.cover, source },
      fadeMonths: months,
    }),
  };
}
