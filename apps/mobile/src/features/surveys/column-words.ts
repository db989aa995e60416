import { CAST_COLUMNS, type CastColumn, type ColumnMapping } from '@mereward/shared/surveys/contract';

/** What each column of a casts file is called on a page. */
export const COLUMN_WORDS: Readonly<Record<CastColumn, string>> = {
  peg: 'Peg',
  mark: 'Far-bank mark',
  offset_deg: 'Degrees beside the mark, right positive',
  bearing_deg_magnetic: 'Compass bearing, degrees',
  wraps_whole: 'Whole wraps',
  wraps_remainder_mm: 'Left over, millimetres',
  rod_angle: 'Rod angle',
  drop: 'How it landed',
  drag: 'How it dragged',
  drag_length_mm: 'Dragged for, millimetres',
  returned: 'What came back',
  depth_pulls: 'Pulls of the float',
  depth_pulls_again: 'Pulls, read again',
  float_sight: 'How the float was seen',
  flags: 'What was wrong',
  note: 'Note',
  at_utc: 'Time, UTC',
};

/** The mapping with one of our columns given to a column of the file, or to none. */
export function mappedTo(mapping: ColumnMapping, column: CastColumn, index: number | null): ColumnMapping {
  const next: ColumnMapping = {};
  for (const each of CAST_COLUMNS) {
    const at = each === column ? index : (mapping[each] ?? null);
    if (at !== null) next[each] = at;
  }
  return next;
}

/** Our name of a column for a reader; the file's own for what is none of ours. */
export function columnWord(column: string): string {
  const ours = CAST_COLUMNS.find((each) => each === column);
  return ours ? COLUMN_WORDS[ours] : column;
}
