import { lettersFault } from '../problems/letters';
import { plainWords } from '../problems/plain-words';
import { readWraps, type Wraps } from '../units/wraps';
import type { CastsGround } from './casts-file';
import {
  CameBack,
  CastFlag,
  CastObservation,
  Drag,
  Drop,
  type Aim,
  type CastColumn,
  type ImportRowError,
} from './contract';

/** One row being read: the text under a column of ours, and where faults are told. */
export type RowReader = {
  text(column: CastColumn): string;
  /** Tells a fault of this row; answers null, so that it can be returned for the value. */
  fault(column: CastColumn, detail: string): null;
  errors: ImportRowError[];
};

/** A number with a decimal point or comma; anything else is null. */
function numberIn(text: string): number | null {
  return /^[+-]?\d+([.,]\d+)?$/.test(text) ? Number(text.replace(',', '.')) : null;
}

function optionalNumber(row: RowReader, column: CastColumn): number | null {
  const text = row.text(column);
  if (text === '') return null;
  return numberIn(text) ?? row.fault(column, 'This is not a number.');
}

const asCode = (text: string): string =>
  text
    .trim()
    .toLowerCase()
    .replace(/[\s-]+/g, '_');

function word<T extends string>(row: RowReader, column: CastColumn, words: readonly T[]): T | null {
  const text = row.text(column);
  if (text === '') return null;
  const found = words.find((each) => each === asCode(text));
  return found ?? row.fault(column, `This is not one of: ${words.join(', ')}.`);
}

function wordList<T extends string>(row: RowReader, column: CastColumn, words: readonly T[]): T[] | null {
  const text = row.text(column);
  if (text === '') return null;
  const found: T[] = [];
  for (const part of text.split(/[,;|+]/)) {
    const each = words.find((known) => known === asCode(part));
    if (!each) return row.fault(column, `“${part.trim()}” is not one of: ${words.join(', ')}.`);
    if (!found.includes(each)) found.push(each);
  }
  return found;
}

/** Stands among the flags of a cast that a person left out of the chart a table is of. */
export const LEFT_OUT_FLAG = 'left_out';

/** What a chart left out is a mark of that chart's, not something seen at the water. */
const flagsOf = (row: RowReader): CastFlag[] =>
  (wordList(row, 'flags', [...CastFlag.options, LEFT_OUT_FLAG]) ?? []).filter(
    (flag) => flag !== LEFT_OUT_FLAG,
  );

function pegOf(row: RowReader, ground: CastsGround): string | null {
  const text = row.text('peg');
  if (text === '') return row.fault('peg', 'Which peg was this cast from?');
  const peg = ground.pegs.find((each) => each.number.toLowerCase() === text.toLowerCase());
  return peg?.id ?? row.fault('peg', 'This lake has no peg of that number.');
}

function aimOf(row: RowReader, ground: CastsGround): Aim | null {
  const named = row.text('mark').toLowerCase();
  if (named !== '') {
    const mark = ground.marks.find(
      (each) => each.code.toLowerCase() === named || each.name.toLowerCase() === named,
    );
    if (!mark) return row.fault('mark', 'This lake has no far-bank mark of that code or name.');
    const offsetDeg = optionalNumber(row, 'offset_deg') ?? 0;
    return { by: 'mark', markId: mark.id, offsetDeg };
  }
  if (row.text('bearing_deg_magnetic') === '')
    return row.fault('mark', 'Neither a far-bank mark nor a compass bearing: where was this cast aimed?');
  const bearingDeg = optionalNumber(row, 'bearing_deg_magnetic');
  if (bearingDeg === null) return null;
  if (bearingDeg < 0 || bearingDeg > 360)
    return row.fault('bearing_deg_magnetic', 'A bearing runs from 0 to 360.');
  return { by: 'compass', bearingDeg: bearingDeg === 360 ? 0 : bearingDeg, method: 'compass_phone' };
}

/** The count and what was left over; a remainder column of its own counts as stated, a share judged by eye does not. */
function lineOf(row: RowReader, spacingM: number): { wraps: Wraps; stated: boolean; text: string } | null {
  const typed = row.text('wraps_whole');
  const read = typed === '' ? null : readWraps(typed, spacingM);
  if (!read) return row.fault('wraps_whole', 'How many wraps?');
  if (!read.ok) return row.fault('wraps_whole', read.reason);
  if (row.text('wraps_remainder_mm') === '')
    return { wraps: read.wraps, stated: read.remainderStated, text: typed };
  const remainderMm = optionalNumber(row, 'wraps_remainder_mm');
  if (remainderMm === null) return null;
  if (read.wraps.remainderM > 0)
    return row.fault('wraps_remainder_mm', 'The remainder is in the count of wraps already; give it once.');
  if (remainderMm < 0 || remainderMm >= spacingM * 1000)
    return row.fault(
      'wraps_remainder_mm',
      `A remainder is less than one wrap, ${Math.round(spacingM * 1000)} mm here.`,
    );
  const wraps = { whole: read.wraps.whole, remainderM: remainderMm / 1000 };
  return { wraps, stated: true, text: `${typed} + ${row.text('wraps_remainder_mm')} mm` };
}

const ROD_ANGLES: Readonly<Record<string, number>> = { level: 0, upright: 90, '45': 45 };

function rodAngleOf(row: RowReader, usualDeg: number): number {
  const text = row.text('rod_angle').replace(/°$/, '');
  if (text === '') return usualDeg;
  const deg = ROD_ANGLES[asCode(text)] ?? numberIn(text);
  return deg ?? row.fault('rod_angle', 'Give level, upright or degrees above level.') ?? usualDeg;
}

function instantOf(row: RowReader, startedAt: string): string | null {
  const text = row.text('at_utc');
  if (text === '') return startedAt;
  const iso = /^\d{4}-\d\d-\d\d[T ]\d\d:\d\d(:\d\d(\.\d+)?)?Z$/.test(text)
    ? new Date(text.replace(' ', 'T'))
    : null;
  // A day that its month doesn't have is read as one of the next.
  if (iso && iso.getUTCDate() === Number(text.slice(8, 10))) return iso.toISOString();
  return row.fault('at_utc', 'Give the time in UTC like 2027-04-03T09:40:00Z.');
}

/** Which of our columns a field of an observation came from, for faults of range. */
const COLUMN_OF: Readonly<Record<string, CastColumn>> = {
  aim: 'offset_deg',
  wrapsWhole: 'wraps_whole',
  remainderM: 'wraps_remainder_mm',
  lineText: 'wraps_whole',
  rodElevationDeg: 'rod_angle',
  dragLengthM: 'drag_length_mm',
  cameBack: 'returned',
  pulls: 'depth_pulls',
  pullsAgain: 'depth_pulls_again',
  flags: 'flags',
  note: 'note',
};

/** One row as a cast, or null with every fault told to the reader. */
export function readObservation(
  row: RowReader,
  ground: CastsGround,
): { pegId: string; observedAt: string; observation: CastObservation } | null {
  const pegId = pegOf(row, ground);
  const aim = aimOf(row, ground);
  const line = lineOf(row, ground.kit.stickSpacingM);
  const observedAt = instantOf(row, ground.startedAt);
  const dragLengthMm = optionalNumber(row, 'drag_length_mm');
  const rest = {
    rodElevationDeg: rodAngleOf(row, ground.kit.rodElevationDeg),
    drop: word(row, 'drop', Drop.options),
    drag: word(row, 'drag', Drag.options),
    dragLengthM: dragLengthMm === null ? null : dragLengthMm / 1000,
    cameBack: wordList(row, 'returned', CameBack.options),
    pulls: optionalNumber(row, 'depth_pulls'),
    pullsAgain: optionalNumber(row, 'depth_pulls_again'),
    floatSight: word(row, 'float_sight', ['good', 'poor'] as const),
    flags: flagsOf(row),
    note: row.text('note'),
  };
  if (pegId === null || aim === null || line === null || observedAt === null) return null;
  const strange = lettersFault(rest.note);
  if (strange) row.fault('note', `${strange}.`);
  const seen = {
    aim,
    sidestepM: 0,
    wrapsWhole: line.wraps.whole,
    remainderM: line.wraps.remainderM,
    remainderStated: line.stated,
    lineText: line.text,
    dropCountS: null,
    smell: null,
    ...rest,
  };
  const parsed = CastObservation.safeParse(seen, { error: plainWords });
  if (parsed.success) return { pegId, observedAt, observation: parsed.data };
  for (const issue of parsed.error.issues)
    row.fault(COLUMN_OF[String(issue.path[0])] ?? 'note', `${issue.message}.`);
  return null;
}
