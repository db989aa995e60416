import type { BoardCell } from '@/features/bookings/board-cells';
import type { BoardLine } from '@/features/bookings/board-words';

/** What is chosen on the board: a line, and the stretch of time that was pressed. */
export type BoardChoice = { lineKey: string; cell: BoardCell };

export type BoardTableProps = {
  /** Names the table: "Board of Far Ostle". */
  caption: string;
  lines: readonly BoardLine[];
  cells: readonly BoardCell[];
  zone: string;
  /** [longitude, latitude] of the lake, whose nights are shaded. */
  place: readonly [number, number] | null;
  nowMs: number;
  chosen: BoardChoice | null;
  onChoose: (choice: BoardChoice) => void;
};
