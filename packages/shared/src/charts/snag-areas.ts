import { Cover } from '../surveys/contract';
import type { BottomEvidence, BottomNodes, ClassGrid } from './bottom-map';

const SNAG = Cover.options.indexOf('snag');
/** A cast that calls a snag likelier than not. */
const LEAST_SHARE = 0.5;
/** A snag's own size, and what a lead slides before it stops: one σ each way, metres. Common practice, no published source. */
const OWN_SIZE_M = 0.5;
const WITHIN_95 = 5.991; // χ² of two degrees

/**
 * Writes every snag felt into a cover map. A snag is a thing and not a share: twenty clear casts round it make it no smaller,
 * and it stays until an event ends its evidence. It lies somewhere within the 95 % ellipse of where its cast came down, and
 * along the line the lead was drawn; all of that reads as snag, as surely as the cast says, and the cell nearest its middle
 * whatever the size of cells. Only of the nodes given; the map is changed in place.
 */
export function markSnags(map: ClassGrid, evidence: readonly BottomEvidence[], { nodes }: BottomNodes): void {
  const open = new Uint8Array(map.classes.length);
  for (const node of nodes) open[node] = 1;
  for (const cast of evidence) {
    const share = cast.shares[SNAG] ?? 0;
    if (share < LEAST_SHARE) continue;
    for (const node of nodesOf(cast, map)) {
      if (open[node] !== 1) continue;
      map.confidence[node] = map.classes[node] === SNAG ? Math.max(share, map.confidence[node]!) : share;
      map.classes[node] = SNAG;
    }
  }
}

type Way = readonly [xM: number, yM: number];

function nodesOf(
  { xM, yM, spread, track }: BottomEvidence,
  { columns, rows, cellM, originM }: ClassGrid,
): number[] {
  const xx = (spread?.xx ?? 0) + OWN_SIZE_M ** 2;
  const yy = (spread?.yy ?? 0) + OWN_SIZE_M ** 2;
  const xy = spread?.xy ?? 0;
  const det = xx * yy - xy * xy;
  const inner = ([ax, ay]: Way, [bx, by]: Way) =>
    (yy * ax * bx - xy * (ax * by + ay * bx) + xx * ay * by) / det;
  const drawn = [track?.xM ?? 0, track?.yM ?? 0] as const;
  const [tx, ty] = drawn;
  const tt = inner(drawn, drawn);
  const isNear = (dx: number, dy: number): boolean => {
    const along = tt > 0 ? Math.min(1, Math.max(0, inner([dx, dy], drawn) / tt)) : 0;
    const off = [dx - along * tx, dy - along * ty] as const;
    return inner(off, off) <= WITHIN_95;
  };
  const reachM = Math.sqrt(WITHIN_95 * Math.max(xx, yy)) + Math.hypot(tx, ty);
  const column = (x: number) => Math.min(columns - 1, Math.max(0, Math.round((x - originM.xM) / cellM)));
  const row = (y: number) => Math.min(rows - 1, Math.max(0, Math.round((y - originM.yM) / cellM)));
  const found = [row(yM + ty) * columns + column(xM + tx)];
  for (let r = row(yM - reachM); r <= row(yM + reachM); r++)
    for (let c = column(xM - reachM); c <= column(xM + reachM); c++)
      if (isNear(originM.xM + c * cellM - xM, originM.yM + r * cellM - yM)) found.push(r * columns + c);
  return found;
}
