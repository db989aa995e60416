import { ruled, stroked, text, type Mark } from './mark';
import type { Palette } from './palette';
import type { View } from './view';

const ROUND_M = [1, 2, 5, 10, 20, 50, 100, 200, 500] as const;

/** A round length that makes a bar of at most this many px. */
export function scaleLengthM(pxPerM: number, mostPx: number): number {
  return [...ROUND_M].reverse().find((lengthM) => lengthM * pxPerM <= mostPx) ?? ROUND_M[0];
}

export type ScaleBar = { x: number; y: number; mostPx: number; stickSpacingM: number; sticks: string };

const BLOCKS = 5;

/** A bar in metres, and the same length in wraps of the stated sticks: marks in px of the page. */
export function scaleBarMarks(view: View, bar: ScaleBar, palette: Palette): Mark[] {
  const lengthM = scaleLengthM(view.pxPerM, bar.mostPx);
  const widthPx = lengthM * view.pxPerM;
  const block = widthPx / BLOCKS;
  const solid = [0, 2, 4].map((i) => boxLine(bar.x + i * block, bar.y, block));
  const words = scaleWords(lengthM, bar);
  return [
    { kind: 'path', lines: solid, closed: true, curved: false, fill: palette.ink, stroke: null },
    {
      kind: 'path',
      lines: [boxLine(bar.x, bar.y, widthPx)],
      closed: true,
      curved: false,
      fill: null,
      stroke: ruled(palette.ink, 1),
    },
    text({
      words,
      x: bar.x + widthPx + 8,
      y: bar.y + 3,
      anchor: 'start',
      colour: palette.ink,
      halo: palette.paper,
    }),
  ];
}

/** "50 m · 13.7 wraps of 12 ft" */
export function scaleWords(
  lengthM: number,
  { stickSpacingM, sticks }: Pick<ScaleBar, 'stickSpacingM' | 'sticks'>,
): string {
  return `${String(lengthM)} m · ${(lengthM / stickSpacingM).toFixed(1)} wraps of ${sticks}`;
}

const boxLine = (x: number, y: number, widthPx: number): number[] => [
  x,
  y,
  x + widthPx,
  y,
  x + widthPx,
  y + 6,
  x,
  y + 6,
];

/** An arrow to true north with its letter, about a point of the page. */
export function northMarks(view: View, at: { x: number; y: number }, palette: Palette): Mark[] {
  const turn = (view.turnDeg * Math.PI) / 180;
  const place = (right: number, up: number): [number, number] => [
    at.x + right * Math.cos(turn) + up * Math.sin(turn),
    at.y + right * Math.sin(turn) - up * Math.cos(turn),
  ];
  const [tip, left, right, tail] = [place(0, 15), place(-5, -9), place(5, -9), place(0, -4)];
  const letter = place(0, 24);
  return [
    stroked([[...place(0, -14), ...tip]], ruled(palette.paper, 5)),
    {
      kind: 'path',
      lines: [[...tip, ...left, ...tail]],
      closed: true,
      curved: false,
      fill: palette.ink,
      stroke: ruled(palette.ink, 1),
    },
    {
      kind: 'path',
      lines: [[...tip, ...right, ...tail]],
      closed: true,
      curved: false,
      fill: palette.paper,
      stroke: ruled(palette.ink, 1),
    },
    text({ words: 'N', x: letter[0], y: letter[1], bold: true, colour: palette.ink, halo: palette.paper }),
  ];
}
