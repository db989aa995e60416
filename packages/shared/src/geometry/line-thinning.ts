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
