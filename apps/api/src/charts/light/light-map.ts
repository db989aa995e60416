import type { Units } from '@mereward/shared/accounts/contract';
import type { PegPageView } from '@mereward/shared/charts/contract';
import { drawExtract } from '@mereward/shared/charts/drawing/extract-page';
import { extractParts } from '@mereward/shared/charts/drawing/extract-parts';
import { stepsOf } from '@mereward/shared/charts/drawing/page';
import { palettes } from '@mereward/shared/charts/drawing/palette';
import { slimSteps } from '@mereward/shared/charts/drawing/slim-steps';
import { PLAIN_SVG, svgOf } from '@mereward/shared/charts/drawing/to-svg';

/** A drawing for the day and for the dusk: each colour is a property of the page, set once for either. */
export type LightMap = { svg: string; day: string; dusk: string };

const SIZE_PX = { widthPx: 358, heightPx: 390 } as const;
const COLOUR = /#[0-9A-F]{6}/gi;

/** The water before a peg as its screen draws it, with its spots by number; null without a chart. */
export function lightMap(page: PegPageView, units: Units): LightMap | null {
  const { extract, spots } = page;
  if (!extract) return null;
  const terms = {
    page,
    extract,
    parts: extractParts(page, extract),
    spots: spots ?? [],
    chosen: 'numbered' as const,
    units,
    ...SIZE_PX,
  };
  const words = {
    ...PLAIN_SVG,
    fontFamily: 'inherit',
    idPrefix: 'map',
    title: `The chart before peg ${page.number}, looking out from it. The spots are listed below by number.`,
  };
  const draw = (name: 'light' | 'dusk'): string => {
    const drawn = drawExtract(terms, palettes[name]);
    return svgOf(slimSteps(stepsOf(drawn), drawn), drawn, words);
  };
  return twoLights(draw('light'), draw('dusk'));
}

/**
 * One drawing out of two that differ in nothing but colours: each pair of colours gets a name. Should they differ in
 * more, the first is kept in its own colours, which stand on their own paper.
 */
export function twoLights(light: string, dusk: string): LightMap {
  if (light.replace(COLOUR, '') !== dusk.replace(COLOUR, '')) return { svg: light, day: '', dusk: '' };
  const other = dusk.match(COLOUR) ?? [];
  const names = new Map<string, { name: string; day: string; dusk: string }>();
  let at = 0;
  const svg = light.replace(COLOUR, (day) => {
    const pair = { name: `--k${names.size}`, day, dusk: other[at++] ?? day };
    const key = `${pair.day} ${pair.dusk}`;
    const known = names.get(key) ?? pair;
    names.set(key, known);
    return `var(${known.name})`;
  });
  const pairs = [...names.values()];
  return {
    svg,
    day: pairs.map((pair) => `${pair.name}:${pair.day}`).join(';'),
    dusk: pairs.map((pair) => `${pair.name}:${pair.dusk}`).join(';'),
  };
}
