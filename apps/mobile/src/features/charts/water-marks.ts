import { mixed } from '@mereward/shared/charts/drawing/colour';
import { filled, ruled, stroked, text, type Mark } from '@mereward/shared/charts/drawing/mark';
import type { Palette } from '@mereward/shared/charts/drawing/palette';
import type { PegWater } from '@mereward/shared/lakes/peg-water-contract';
import { inksOver } from './chart-inks';
import { sharedLetters } from './peg-words';

type Rings = PegWater['rings'];

/** Sides of rings, each side that two rings share once: drawn twice, its dashes would run into each other. */
export function bordersOnce(rings: Rings): number[][] {
  const seen = new Set<string>();
  const lines: number[][] = [];
  for (const ring of rings) {
    let line: number[] = [];
    for (let i = 0; i + 3 < ring.length; i += 2) {
      const [ax = 0, ay = 0, bx = 0, by = 0] = ring.slice(i, i + 4);
      const [a, b] = [`${String(ax)},${String(ay)}`, `${String(bx)},${String(by)}`];
      const side = a < b ? `${a} ${b}` : `${b} ${a}`;
      if (seen.has(side)) {
        if (line.length) lines.push(line);
        line = [];
        continue;
      }
      seen.add(side);
      if (line.length === 0) line.push(ax, ay);
      line.push(bx, by);
    }
    if (line.length) lines.push(line);
  }
  return lines;
}

/** The borders between pegs’ waters; the chosen peg’s own drawn stronger. */
export function waterMarks(pegs: readonly PegWater[], palette: Palette, chosenId: string | null): Mark[] {
  const chosen = pegs.find(({ pegId }) => pegId === chosenId);
  const borders = bordersOnce(pegs.flatMap(({ rings }) => rings));
  const { ink, halo } = inksOver(palette);
  const own = (stroke: ReturnType<typeof ruled>): Mark[] =>
    chosen ? [{ ...stroked(chosen.rings, stroke), closed: true }] : [];
  return [
    stroked(borders, ruled(halo, 2)),
    stroked(borders, ruled(ink, 1, [5, 3])),
    ...own(ruled(halo, 4.6)),
    ...own(ruled(palette.selected, 2.2)),
  ];
}

const TINTS = [0.12, 0.24, 0.34];
const CHOSEN_TINT = 0.28;

/** Waters on a bare lake: neighbours tinted apart, each with its peg’s number in it. */
export function waterSheetMarks(
  pegs: readonly PegWater[],
  palette: Palette,
  chosenId: string | null,
): Mark[] {
  const tints = TINTS.map((share) => mixed(palette.paper, palette.waterLine, share));
  const chosenTint = mixed(palette.paper, palette.selected, CHOSEN_TINT);
  const letters = sharedLetters(pegs.map(({ number }) => number)).length;
  return [
    ...pegs.map(({ rings, pegId }, i) =>
      filled(rings, pegId === chosenId ? chosenTint : (tints[i % tints.length] ?? palette.paper)),
    ),
    ...waterMarks(pegs, palette, chosenId),
    ...pegs.flatMap((peg): Mark[] => {
      const at = middleOf(peg.rings);
      if (!at) return [];
      const chosen = peg.pegId === chosenId;
      const words = peg.number.slice(letters);
      return [text({ words, ...at, bold: chosen, colour: palette.ink, halo: palette.paper })];
    }),
  ];
}

/** The middle of the longest ring, by its corners. */
function middleOf(rings: Rings): { x: number; y: number } | null {
  const longest = [...rings].sort((a, b) => b.length - a.length)[0];
  if (!longest || longest.length < 6) return null;
  let [x, y] = [0, 0];
  for (let i = 0; i + 1 < longest.length; i += 2) {
    x += longest[i] ?? 0;
    y += longest[i + 1] ?? 0;
  }
  const count = longest.length / 2;
  return { x: x / count, y: y / count };
}
