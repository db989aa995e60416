/** Where the arrow keys lead on a grid of rows and columns, from a place; null for a key that moves nothing. */
export function movedTo(
  key: string,
  [row, column]: readonly [number, number],
  [rows, columns]: readonly [number, number],
): [number, number] | null {
  const within = (at: number, count: number): number => Math.min(count - 1, Math.max(0, at));
  switch (key) {
    case 'ArrowUp':
      return [within(row - 1, rows), column];
    case 'ArrowDown':
      return [within(row + 1, rows), column];
    case 'ArrowLeft':
      return [row, within(column - 1, columns)];
    case 'ArrowRight':
      return [row, within(column + 1, columns)];
    case 'Home':
      return [row, 0];
    case 'End':
      return [row, columns - 1];
    case 'PageUp':
      return [0, column];
    case 'PageDown':
      return [rows - 1, column];
    default:
      return null;
  }
}
