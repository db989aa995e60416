import type { GridFrame } from './cell-frame';
import { thinLine } from './line-thinning';

/** A cell of no region. */
export const NO_REGION = -1;

/** Lines are thinned by this share of a cell: half of what parts them at least. */
const THIN_SHARE = 0.25;

/**
 * The borders of regions of cells as closed rings (x, y, x, y … metres, the first place again at the end), a list of rings
 * a region. `regions`: for every cell of the frame the number of its region, `NO_REGION` or less for none. Corners are cut
 * from the middle of one cell side to the next, and every stretch between two places where three or more regions meet is
 * drawn once and used by both its neighbours, so that regions never overlap and leave no gaps. Outer rings run
 * counter-clockwise, holes clockwise. Cells that touch at a corner only are not joined.
 */
export function regionRings(regions: ArrayLike<number>, frame: GridFrame, count: number): number[][][] {
  const lattice = new Lattice(regions, frame);
  const rings: number[][][] = Array.from({ length: count }, () => []);
  const seen = new Uint8Array(4 * (frame.columns + 1) * (frame.rows + 1));
  for (let node = 0; node < lattice.nodes; node++) {
    for (let way = 0; way < 4; way++) {
      const region = lattice.leftOf(node, way);
      if (region < 0 || region >= count || region === lattice.rightOf(node, way)) continue;
      if (seen[4 * node + way] === 1) continue;
      rings[region]!.push(ringFrom(lattice, { node, way, region }, seen));
    }
  }
  return rings;
}

type Walk = { node: number; way: number; region: number };

function ringFrom(lattice: Lattice, start: Walk, seen: Uint8Array): number[] {
  const steps: [node: number, way: number][] = [];
  let { node, way } = start;
  do {
    seen[4 * node + way] = 1;
    steps.push([node, way]);
    node = lattice.ahead(node, way);
    way = lattice.turn(node, way, start.region);
  } while (seen[4 * node + way] !== 1);
  return ringOf(lattice, steps);
}

/** Joins the stretches of a ring, each thinned in a direction of its own that both its neighbours use. */
function ringOf(lattice: Lattice, steps: readonly [number, number][]): number[] {
  const first = steps.findIndex(([node]) => lattice.isJunction(node));
  if (first < 0) return closedStretch(lattice, steps);
  const ring: number[] = [];
  let stretch: [number, number][] = [];
  for (let i = 0; i < steps.length; i++) {
    stretch.push(steps[(first + i) % steps.length]!);
    const [next] = steps[(first + i + 1) % steps.length]!;
    if (!lattice.isJunction(next)) continue;
    ring.push(...openStretch(lattice, stretch).slice(0, -2));
    stretch = [];
  }
  return [...ring, ring[0]!, ring[1]!];
}

function openStretch(lattice: Lattice, steps: readonly [number, number][]): number[] {
  const [from] = steps[0]!;
  const [lastNode, lastWay] = steps[steps.length - 1]!;
  const to = lattice.ahead(lastNode, lastWay);
  const line = [
    ...lattice.place(from),
    ...steps.flatMap(([node, way]) => lattice.middle(node, way)),
    ...lattice.place(to),
  ];
  const forward = lattice.side(...steps[0]!) <= lattice.side(lastNode, lastWay);
  return forward ? lattice.thinned(line) : reversed(lattice.thinned(reversed(line)));
}

function closedStretch(lattice: Lattice, steps: readonly [number, number][]): number[] {
  const sides = steps.map(([node, way]) => lattice.side(node, way));
  const least = sides.indexOf(minimumOf(sides));
  const count = steps.length;
  const middles = steps.map((_, i) => lattice.middle(...steps[(least + i) % count]!));
  const line = [...middles.flat(), ...middles[0]!];
  const forward = sides[(least + 1) % count]! <= sides[(least + count - 1) % count]!;
  return forward ? lattice.thinned(line) : reversed(lattice.thinned(reversed(line)));
}

const minimumOf = (values: readonly number[]): number =>
  values.reduce((least, value) => (value < least ? value : least), Infinity);

function reversed(line: readonly number[]): number[] {
  const out: number[] = [];
  for (let i = line.length - 2; i >= 0; i -= 2) out.push(line[i]!, line[i + 1]!);
  return out;
}

/** Ways: 0 east, 1 north, 2 west, 3 south. Nodes are the cells' corners, row-major, one more than cells each way. */
const ACROSS = [1, 0, -1, 0] as const;
const UP = [0, 1, 0, -1] as const;

class Lattice {
  readonly nodes: number;
  private readonly wide: number;
  constructor(
    private readonly regions: ArrayLike<number>,
    private readonly frame: GridFrame,
  ) {
    this.wide = frame.columns + 1;
    this.nodes = this.wide * (frame.rows + 1);
  }

  private cell(column: number, row: number): number {
    const { columns, rows } = this.frame;
    if (column < 0 || row < 0 || column >= columns || row >= rows) return NO_REGION;
    return Math.max(NO_REGION, this.regions[row * columns + column]!);
  }

  /** Region on the left of the side that leaves a node one way; the same as on its right where there is no side. */
  leftOf(node: number, way: number): number {
    const [c, r] = [node % this.wide, Math.floor(node / this.wide)];
    return [this.cell(c, r), this.cell(c - 1, r), this.cell(c - 1, r - 1), this.cell(c, r - 1)][way]!;
  }
  rightOf(node: number, way: number): number {
    return this.leftOf(node, (way + 3) & 3);
  }

  ahead(node: number, way: number): number {
    return node + ACROSS[way]! + UP[way]! * this.wide;
  }

  /** The next way along a region kept on the left: leftmost first, so that corners that only touch part. */
  turn(node: number, way: number, region: number): number {
    for (const next of [(way + 1) & 3, way, (way + 3) & 3])
      if (this.leftOf(node, next) === region && this.rightOf(node, next) !== region) return next;
    return (way + 2) & 3;
  }

  isJunction(node: number): boolean {
    let sides = 0;
    for (let way = 0; way < 4; way++) if (this.leftOf(node, way) !== this.rightOf(node, way)) sides++;
    return sides > 2;
  }

  /** One number for a side, whichever way it is walked. */
  side(node: number, way: number): number {
    return way < 2 ? 2 * node + way : 2 * this.ahead(node, way) + (way - 2);
  }

  place(node: number): [number, number] {
    const { originM, cellM } = this.frame;
    const [c, r] = [node % this.wide, Math.floor(node / this.wide)];
    return [originM.xM + (c - 0.5) * cellM, originM.yM + (r - 0.5) * cellM];
  }

  middle(node: number, way: number): [number, number] {
    const [xM, yM] = this.place(node);
    const halfM = this.frame.cellM / 2;
    return [xM + ACROSS[way]! * halfM, yM + UP[way]! * halfM];
  }

  thinned(line: readonly number[]): number[] {
    return thinLine(line, THIN_SHARE * this.frame.cellM).map((lengthM) => Math.round(lengthM * 100) / 100);
  }
}
