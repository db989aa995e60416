import { CAST_COLUMNS, type CastColumn, type ColumnMapping } from './contract';

/** Headings that people give these columns, beside our own names. Written without case, spaces or signs. */
const ALSO_CALLED: Readonly<Record<CastColumn, readonly string[]>> = {
  peg: ['swim', 'peg_no', 'peg_number'],
  mark: ['marker', 'far_bank_mark', 'far_bank_marker', 'aim'],
  offset_deg: ['offset', 'aim_offset', 'aim_offset_deg'],
  bearing_deg_magnetic: ['bearing', 'bearing_deg', 'compass', 'compass_deg', 'bearing_magnetic'],
  wraps_whole: ['wraps', 'wrap', 'whole_wraps'],
  wraps_remainder_mm: ['remainder', 'remainder_mm', 'part_wrap', 'part_wrap_mm'],
  rod_angle: ['rod', 'rod_elevation', 'rod_elevation_deg'],
  drop: ['landing', 'landing_feel', 'drop_feel', 'lands'],
  drag: ['drag_feel', 'drags'],
  drag_length_mm: ['drag_length', 'drag_to_mm'],
  returned: ['came_back', 'comes_back', 'what_came_back'],
  depth_pulls: ['pulls', 'depth_count'],
  depth_pulls_again: ['pulls_again', 'second_pulls', 'pulls_2'],
  float_sight: ['float'],
  flags: ['flag'],
  note: ['notes', 'remark', 'remarks', 'comment'],
  at_utc: ['at', 'time', 'time_utc', 'observed_at'],
};

function plain(heading: string): string {
  return heading
    .trim()
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '_')
    .replace(/^_|_$/g, '');
}

/** Which column of the file is which of ours, guessed from the heading; what is not recognised is left out. */
export function guessMapping(heading: readonly string[]): ColumnMapping {
  const names = heading.map(plain);
  const mapping: ColumnMapping = {};
  for (const column of CAST_COLUMNS) {
    const index = [column, ...ALSO_CALLED[column]].map((name) => names.indexOf(name)).find((at) => at >= 0);
    if (index !== undefined && !Object.values(mapping).includes(index)) mapping[column] = index;
  }
  return mapping;
}

/** Headings that stand over more than one column: which of them is meant can't be known. */
export function repeatedHeadings(heading: readonly string[]): string[] {
  const names = heading.map(plain);
  return [...new Set(heading.filter((_, i) => names[i] !== '' && names.indexOf(names[i] ?? '') !== i))];
}
