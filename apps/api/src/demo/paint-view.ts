import type { DemoLake } from './fishery';
import { seeded } from './random';

type Rgb = readonly [number, number, number];
export type Painting = { width: number; height: number; rgba: Buffer };

const SIZE = { width: 960, height: 640 };
const HORIZON = 0.44; // share of the height
const VIEW_DEG = 60;
const SKY: readonly [Rgb, Rgb] = [
  [186, 205, 214],
  [240, 232, 214],
];
const WATER: Rgb = [70, 98, 104];
const GRASS: Rgb = [92, 104, 60];

const mix = (a: Rgb, b: Rgb, share: number): Rgb => [
  a[0] + (b[0] - a[0]) * share,
  a[1] + (b[1] - a[1]) * share,
  a[2] + (b[2] - a[2]) * share,
];

/** The view over the water from a peg's origin mark, painted: sky, far bank, its marks where they stand, water, near bank. */
export function paintView(lake: DemoLake, peg: DemoLake['pegs'][number]): Painting {
  const { width, height } = SIZE;
  const random = seeded(peg.details.number.length * 7919 + Math.round(peg.facingDeg * 10));
  const line = treeLine(random, width);
  const marks = silhouettes(lake, peg);
  const rgba = Buffer.alloc(width * height * 4, 255);
  const horizonY = Math.round(height * HORIZON);
  for (let y = 0; y < height; y++)
    for (let x = 0; x < width; x++) {
      const at = mirrored(y, horizonY);
      const land = landAt(x, at.y, { line, marks, horizonY, random });
      const dry = land ?? mix(SKY[0], SKY[1], Math.max(0, at.y) / horizonY);
      const seen = at.inWater ? mix(dry, WATER, 0.45 + 0.25 * ripple(x, y)) : dry;
      const near = nearBank(x, y, height);
      const [r, g, b] = near ?? seen;
      rgba.set([r, g, b, 255], (y * width + x) * 4);
    }
  return { width, height, rgba };
}

/** Below the horizon the water mirrors what stands above it, a little flattened. */
const mirrored = (y: number, horizonY: number): { y: number; inWater: boolean } =>
  y <= horizonY ? { y, inWater: false } : { y: horizonY - (y - horizonY) * 0.8, inWater: true };

const ripple = (x: number, y: number): number =>
  0.5 + 0.5 * Math.sin(y * 0.55 + 1.7 * Math.sin(x / 90 + y / 60)) * Math.min(1, y / 600);

/** Heights of the far bank's trees above the horizon, px. */
function treeLine(random: () => number, width: number): Float64Array {
  const waves = Array.from({ length: 7 }, (_, i) => ({
    k: (i + 1) * (1.3 + random()),
    phase: random() * 6.28,
    high: 14 / (i + 1),
  }));
  return Float64Array.from({ length: width }, (_, x) =>
    waves.reduce((sum, { k, phase, high }) => sum + high * Math.sin((x / width) * 6.28 * k + phase), 30),
  );
}

type Silhouette = { x: number; halfPx: number; highPx: number; tree: boolean };

function silhouettes(lake: DemoLake, peg: DemoLake['pegs'][number]): Silhouette[] {
  return lake.marks.flatMap(({ at, details }) => {
    const dx = at.xM - peg.origin.xM;
    const dy = at.yM - peg.origin.yM;
    const offDeg = (((((Math.atan2(dx, dy) * 180) / Math.PI - peg.facingDeg) % 360) + 540) % 360) - 180;
    if (Math.abs(offDeg) > VIEW_DEG / 2) return [];
    const tree = details.permanence === 'tree';
    const size = 9000 / Math.hypot(dx, dy);
    return [
      {
        x: SIZE.width * (0.5 + offDeg / VIEW_DEG),
        halfPx: size * (tree ? 0.22 : 0.16),
        highPx: 24 + size * (tree ? 1.1 : 0.8),
        tree,
      },
    ];
  });
}

type Land = { line: Float64Array; marks: Silhouette[]; horizonY: number; random: () => number };

function landAt(x: number, y: number, { line, marks, horizonY, random }: Land): Rgb | null {
  const above = horizonY - y;
  for (const mark of marks) {
    const aside = Math.abs(x - mark.x) / mark.halfPx;
    const top = mark.tree
      ? mark.highPx * Math.sqrt(Math.max(0, 1 - aside * aside))
      : mark.highPx * (1 - 0.25 * aside);
    if (aside <= 1 && above <= top) return mark.tree ? [62, 70, 44] : [128, 96, 78];
  }
  const crown = (line[x] ?? 30) + 3 * random();
  if (above > crown) return null;
  return mix([58, 72, 46], [104, 112, 70], Math.max(0, above) / 60 + 0.25 * random());
}

/** Grass at the foot of the picture, and the peg's platform in the middle of it. */
function nearBank(x: number, y: number, height: number): Rgb | null {
  const edge = height * 0.9 + 8 * Math.sin(x / 70) + 5 * Math.sin(x / 19);
  if (y < edge) return null;
  const boards = Math.abs(x - SIZE.width / 2) < 120 + (y - edge) * 0.9;
  if (boards) return Math.floor(y / 9) % 2 === 0 ? [142, 122, 96] : [128, 108, 84];
  return mix(GRASS, [66, 78, 42], 0.5 + 0.5 * Math.sin(x * 0.9 + y * 1.3));
}
