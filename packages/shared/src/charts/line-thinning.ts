export { thinLine } from '../geometry/line-thinning';

export type Box = { westM: number; eastM: number; southM: number; northM: number };

/** The pieces of a line inside a box, cut at its edges. Source: Liang & Barsky 1984, side by side. */
export function clipLine(line: readonly number[], box: Box): number[][] {
  const pieces: number[][] = [];
  let piece: number[] = [];
  for (let i = 0; i + 3 < line.length; i += 2) {
    const [ax = 0, ay = 0, bx = 0, by = 0] = line.slice(i, i + 4);
    const span = spanInside([ax, ay, bx - ax, by - ay], box);
    if (!span) continue;
    const [from, to] = span;
    const at = (share: number): number[] => [ax + share * (bx - ax), ay + share * (by - ay)];
    if (from > 0 || piece.length === 0) {
      if (piece.length > 2) pieces.push(piece);
      piece = at(from);
    }
    piece.push(...at(to));
    if (to < 1) {
      pieces.push(piece);
      piece = [];
    }
  }
  if (piece.length > 2) pieces.push(piece);
  return pieces;
}

/** Which shares of a side, from its start, lie inside; null when none does. */
function spanInside(
  [x, y, dx, dy]: readonly [number, number, number, number],
  box: Box,
): [number, number] | null {
  let from = 0;
  let to = 1;
  const bounds = [
    [-dx, x - box.westM],
    [dx, box.eastM - x],
    [-dy, y - box.southM],
    [dy, box.northM - y],
  ] as const;
  for (const [slope, room] of bounds) {
    if (slope === 0) {
      if (room < 0) return null;
      continue;
    }
    const share = room / slope;
    if (slope < 0) from = Math.max(from, share);
    else to = Math.min(to, share);
    if (from > to) return null;
  }
  return [from, to];
}
