import { mixed } from '@mereward/shared/charts/drawing/colour';
import { filled, ruled, stroked, text, type Mark } from '@mereward/shared/charts/drawing/mark';
import type { Palette } from '@mereward/shared/charts/drawing/palette';
import type { PegWater } from '@mereward/shared/lakes/peg-water-contract';

const closed = (rings: PegWater['rings']) => ({
  lines: (stroke: ReturnType<typeof ruled>): Mark => ({ ...stroked(rings, stroke), closed: true }),
});

/** The borders between pegs' waters; the chosen peg's own drawn stronger, its number in the middle of it. */
export function waterMarks(pegs: readonly PegWater[], palette: Palette, chosenId: string | null): Mark[] {
  const chosen = pegs.find(({ pegId }) => pegId === chosenId);
  return [
    ...pegs.flatMap(({ rings }): Mark[] => [
      closed(rings).lines(ruled(palette.labelLight, 2.6)),
      closed(rings).lines(ruled(palette.labelDark, 1.1, [2, 3])),
    ]),
    ...(chosen
      ? [
          closed(chosen.rings).lines(ruled(palette.labelLight, 5)),
          closed(chosen.rings).lines(ruled(palette.selected, 2.4)),
        ]
      : []),
  ];
}

/** Waters on a bare lake: every other one tinted, so that neighbours are told apart, and each numbered. */
export function waterSheetMarks(
  pegs: readonly PegWater[],
  palette: Palette,
  chosenId: string | null,
): Mark[] {
  const tints = [0.12, 0.24, 0.34].map((share) => mixed(palette.paper, palette.waterLine, share));
  return [
    ...pegs.map(({ rings, pegId }, i) =>
      filled(
        rings,
        pegId === chosenId
          ? mixed(palette.paper, palette.selected, 0.28)
          : (tints[i % tints.length] ?? palette.paper),
      ),
    ),
    ...waterMarks(pegs, palette, chosenId),
    ...pegs.flatMap((peg): Mark[] => {
      const at = middleOf(peg.rings);
      return at
        ? [
            text({
              words: peg.number,
              ...at,
              sizePx: 13,
              bold: peg.pegId === chosenId,
              colour: palette.ink,
              halo: palette.paper,
            }),
          ]
        : [];
    }),
  ];
}

/** The middle of the largest ring, by its corners. */
function middleOf(rings: PegWater['rings']): { x: number; y: number } | null {
  const largest = [...rings].sort((a, b) => b.length - a.length)[0];
  if (!largest || largest.length < 6) return null;
  let [x, y] = [0, 0];
  for (let i = 0; i + 1 < largest.length; i += 2) {
    x += largest[i] ?? 0;
    y += largest[i + 1] ?? 0;
  }
  const count = largest.length / 2;
  return { x: x / count, y: y / count };
}
