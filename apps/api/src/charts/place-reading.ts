import { readChart } from '@mereward/shared/charts/chart-reading';
import type { PlaceReading } from '@mereward/shared/charts/chart-answers';
import { depthTodayM } from '@mereward/shared/charts/spot-words';
import type { LonLat } from '@mereward/shared/geometry/geodesic';
import { toPlane } from '@mereward/shared/geometry/plane';
import { UNREAD_DEPTH } from '@mereward/shared/surveys/error-budget';
import { placeWater, type WatersFound } from '../lakes/peg-waters';
import type { PegGround } from './peg-chart';
import { castToQuote } from './spot-cast';
import { quoted, within, type OpenChart, type Quoted } from './spot-view';

/** A cast that landed no farther than this from a place is quoted for it, metres: about as far as a good cast repeats. */
const QUOTE_WITHIN_M = 1.5;

export type PlaceAsked = { ground: PegGround; open: OpenChart | null; waters: WatersFound };

/** What is known of one place, whole and as this reader may see it. */
export function placeReading(
  { ground, open, waters }: PlaceAsked,
  position: LonLat,
): { shown: Quoted; place: PlaceReading } {
  const at = toPlane(ground.origin, position);
  const cast = open ? castToQuote(open.chart.content.built.soundings, at, QUOTE_WITHIN_M) : null;
  const reading = open ? readChart(open.layers, at) : null;
  const shown = within(ground, quoted({ chart: open?.chart ?? null, cast, reading }));
  const { depthM, depthSigmaM, bottom, bottomConfidence, grade, quotedFrom, surveyedOn } = shown;
  const level = ground.levelNow;
  const datumM = open?.chart.datumM ?? ground.lake.datumM;
  const tenth = (metres: number) =>
    ground.sight.sees.depth ? Math.round(metres * 10) / 10 : Math.round(metres);
  return {
    shown,
    place: {
      xM: tenth(at.xM),
      yM: tenth(at.yM),
      position: [position[0], position[1]],
      depthM,
      depthSigmaM,
      depthTodayM: depthM === null || level === null ? null : depthTodayM(depthM, level.levelM, datumM),
      bottom,
      bottomConfidence,
      grade,
      quotedFrom,
      surveyedOn,
      water: placeWater(waters, ground.peg.id, at),
    },
  };
}

/**
 * Depth of the water today at a place, to slope a line by, metres. Whoever may not see depths gets a middling one: a line
 * goes down as well as out, and the true one would show through.
 */
export function slopingDepthM(
  { ground, open }: Pick<PlaceAsked, 'ground' | 'open'>,
  position: LonLat,
): number {
  if (!open || !ground.sight.sees.depth) return UNREAD_DEPTH.depthM;
  const at = toPlane(ground.origin, position);
  const { depthM } = readChart(open.layers, at);
  if (depthM === null) return UNREAD_DEPTH.depthM;
  const { levelNow } = ground;
  return Math.max(0, levelNow ? depthTodayM(depthM, levelNow.levelM, open.chart.datumM) : depthM);
}

/** Why depth or bottom is missing from an answer about a place, in words; null when nothing is. */
export function whyMissing(
  { ground }: PlaceAsked,
  { depthM, bottom }: Pick<Quoted, 'depthM' | 'bottom'>,
): string | null {
  const { sees, notes } = ground.sight;
  if (!sees.depth || !sees.bottom) return notes.depth ?? notes.bottom;
  if (depthM === null && bottom === null) return 'Not surveyed: no cast landed near enough to this place.';
  return null;
}
