import { ruled, stroked, text, type Line, type Mark } from '@mereward/shared/charts/drawing/mark';
import type { Palette } from '@mereward/shared/charts/drawing/palette';
import { toPage, type View } from '@mereward/shared/charts/drawing/view';
import { inksOver } from './chart-inks';
import type { Tale } from './tale';

type Scene = { palette: Palette; view: View; chosenKey: string | null };

/**
 * What the chart tells, on the map: a feature by a broken outline and its name, a patch by a whole one and its rank in a
 * disc, a change hatched one way where it is deeper and the other where it is shallower.
 */
export function taleMarks(tales: readonly Tale[], scene: Scene): Mark[] {
  const rest = tales.filter(({ key }) => key !== scene.chosenKey);
  const chosen = tales.filter(({ key }) => key === scene.chosenKey);
  const all = [...rest, ...chosen]; // the chosen one on top
  return [
    ...all.flatMap((tale) => (isChange(tale) ? [hatchOf(tale, scene)] : [])),
    ...all.flatMap((tale) => outlineOf(tale, scene)),
    ...roomFor(tales, scene).flatMap((tale) => signOf(tale, scene)),
  ];
}

const isChange = ({ kind }: Tale): boolean => kind !== 'feature' && kind !== 'patch';

function outlineOf({ key, kind, certain, rings }: Tale, { palette, chosenKey }: Scene): Mark[] {
  const chosen = key === chosenKey;
  const { ink, halo } = inksOver(palette);
  const dash = kind === 'patch' ? null : kind === 'feature' ? (certain ? [7, 4] : [2, 4]) : null;
  const colour = chosen ? palette.selected : ink;
  const ring = (stroke: ReturnType<typeof ruled>): Mark => ({ ...stroked(rings, stroke), closed: true });
  return [ring(ruled(halo, chosen ? 4.6 : 3)), ring(ruled(colour, chosen ? 2.4 : 1.4, dash))];
}

const LETTER_PX = 6.4;
const LINE_PX = 17;
const DISC_PX = 20;

/** Those whose sign stands clear of the signs before it: the chosen one first, then the certain, then by size. */
export function roomFor(tales: readonly Tale[], { view, chosenKey }: Scene): Tale[] {
  const weight = ({ key, certain, areaM2 }: Tale): number =>
    (key === chosenKey ? 2e9 : 0) + (certain ? 1e9 : 0) + Math.min(areaM2, 9e8);
  const placed: { x: number; y: number; halfPx: number }[] = [];
  return [...tales]
    .sort((a, b) => weight(b) - weight(a))
    .filter((tale) => {
      const { x, y } = toPage(view, tale.xM, tale.yM);
      const halfPx = tale.kind === 'patch' ? DISC_PX / 2 : (LETTER_PX * (tale.sign.length + 1)) / 2;
      const clear = placed.every(
        (other) => Math.abs(other.x - x) > other.halfPx + halfPx || Math.abs(other.y - y) > LINE_PX,
      );
      if (clear) placed.push({ x, y, halfPx });
      return clear;
    })
    .reverse(); // the chosen one is drawn last
}

const DISC = 'm-9 0a9 9 0 1 0 18 0a9 9 0 1 0 -18 0z';

function signOf({ key, kind, sign, certain, xM, yM }: Tale, { palette, chosenKey }: Scene): Mark[] {
  const chosen = key === chosenKey;
  const { ink, halo } = inksOver(palette);
  if (kind === 'patch')
    return [
      {
        kind: 'glyphs',
        at: [xM, yM],
        glyph: DISC,
        fill: chosen ? palette.selected : halo,
        stroke: ruled(chosen ? halo : ink, 1.4),
      },
      text({
        words: sign,
        x: xM,
        y: yM,
        bold: true,
        colour: chosen ? palette.onSelected : ink,
      }),
    ];
  return [
    text({
      words: certain ? sign : `${sign}?`,
      x: xM,
      y: yM,
      slanted: true,
      bold: chosen,
      colour: ink,
      halo,
    }),
  ];
}

const HATCH_PX = 7;

function hatchOf(tale: Tale, { palette, view, chosenKey }: Scene): Mark {
  const stepM = HATCH_PX / view.pxPerM;
  const xs = tale.rings.flatMap((ring) => ring.filter((_, i) => i % 2 === 0));
  const ys = tale.rings.flatMap((ring) => ring.filter((_, i) => i % 2 === 1));
  const [west, east] = [Math.min(...xs), Math.max(...xs)];
  const [south, north] = [Math.min(...ys), Math.max(...ys)];
  const heightM = north - south;
  const lines: Line[] = [];
  for (let x = west - heightM; x <= east + heightM; x += stepM) {
    if (tale.kind !== 'shallower') lines.push([x, north, x + heightM, south]);
    if (tale.kind !== 'deeper') lines.push([x, south, x + heightM, north]);
  }
  const { ink, halo } = inksOver(palette);
  const colour = tale.key === chosenKey ? palette.selected : ink;
  return {
    kind: 'clip',
    lines: tale.rings,
    marks: [stroked(lines, ruled(halo, 2.2)), stroked(lines, ruled(colour, 0.9))],
  };
}
