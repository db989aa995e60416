export type Box = { westM: number; eastM: number; southM: number; northM: number };

/** A line of x, y, x, y … metres with the points that lie within `toleranceM` of it left out. Source: Douglas & Peucker 1973. */
export function thinLine(line: readonly number[], toleranceM: number): number[] {
  const count = Math.floor(line.length / 2);
  if (count < 3) return line.slice();
  const kept = new Uint8Array(count);
  kept[0] = 1;
  kept[count - 1] = 1;
  const stack: [number, number][] = [[0, count - 1]];
  for (let span = stack.pop(); span; span = stack.pop()) {
    const [from, to] = span;
    const far = farthest(line, from, to);
    if (far.awayM <= toleranceM) continue;
    kept[far.at] = 1;
    stack.push([from, far.at], [far.at, to]);
  }
  const thinned: number[] = [];
  for (let i = 0; i < count; i++) if (kept[i] === 1) thinned.push(line[2 * i] ?? 0, line[2 * i + 1] ?? 0);
  return thinned;
}

function farthest(line: readonly number[], from: number, to: number): { at: number; awayM: number } {
  const [ax = 0, ay = 0] = [line[2 * from], line[2 * from + 1]];
  const [bx = 0, by = 0] = [line[2 * to], line[2 * to + 1]];
  const square = (bx - ax) ** 2 + (by - ay) ** 2;
  let best = { at: from, awayM: -1 };
  for (let i = from + 1; i < to; i++) {
    const dx = (line[2 * i] ?? 0) - ax;
    const dy = (line[2 * i + 1] ?? 0) - ay;
    // To the stretch between the ends, not to its endless line: a spike past an end must count, and a closed line too.
    const share = square > 0 ? Math.min(1, Math.max(0, (dx * (bx - ax) + dy * (by - ay)) / square)) : 0;
    const awayM = Math.hypot(dx - share * (bx - ax), dy - share * (by - ay));
    if (awayM > best.awayM) best = { at: i, awayM };
  }
  return best;
}

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
