import type { SurveyCast } from '@mereward/db/entities/surveys/survey-cast';
import type { SurveyVisit } from '@mereward/db/entities/surveys/survey-visit';
import type { SoundingView } from '@mereward/shared/surveys/contract';
import type { LonLat } from '@mereward/shared/geometry/geodesic';
import { civilDay } from '@mereward/shared/time/civil-day';
import { FOOT_M } from '@mereward/shared/units/length';
import type { VisitSite } from './reduce-visit';

/**
 * The columns of a table of casts, in their order. The import reads back those that were observed; what was worked out
 * from them (places, lengths, depths, grades) it leaves alone. Lengths in millimetres, and again in metres and as the
 * angler counts: as typed, in pulls and in feet.
 */
export const CAST_COLUMNS_OUT = [
  'visit_id',
  'peg',
  'seq',
  'marker',
  'offset_deg',
  'bearing_deg_true',
  'bearing_method',
  'bearing_deg_magnetic',
  'wraps_whole',
  'wraps_remainder_mm',
  'line_text',
  'stick_mm',
  'line_length_mm',
  'line_length_m',
  'rod_angle',
  'horizontal_mm',
  'horizontal_m',
  'drop',
  'drag',
  'drag_from_mm',
  'drag_to_mm',
  'returned',
  'depth_pulls',
  'depth_pulls_again',
  'pull_mm',
  'offset_mm',
  'depth_mm',
  'depth_m',
  'float_sight',
  'gauge_mm_start',
  'gauge_mm_end',
  'depth_at_datum_mm',
  'depth_at_datum_m',
  'depth_at_datum_ft',
  'depth_sigma_m',
  'bottom',
  'grade',
  'lat',
  'lon',
  'flags',
  'note',
  'by',
  'day',
  'at_utc',
  'not_reduced_because',
] as const;

export type CastCell = string | number | null;
export type CastCells = Partial<Record<(typeof CAST_COLUMNS_OUT)[number], CastCell>>;

const to = (value: number, digits: number): number => Number(value.toFixed(digits));
const mm = (lengthM: number | null): number | null => (lengthM === null ? null : Math.round(lengthM * 1000));
const m = (lengthM: number | null): number | null => (lengthM === null ? null : to(lengthM, 3));

export type CastOfVisit = { site: VisitSite; cast: SurveyCast; zone: string; by: string };

/** One row: what was observed, beside what it was reduced to. */
export function castRow({ site, cast, zone, by }: CastOfVisit, reduced: CastCells): CastCell[] {
  const row: CastCells = {
    ...visitCells(site.visit),
    ...observedCells(site, cast),
    ...reduced,
    by,
    day: civilDay(cast.observedAt, zone),
    at_utc: cast.observedAt.toISOString(),
  };
  return CAST_COLUMNS_OUT.map((column) => row[column] ?? null);
}

function visitCells({ id, kit, gaugeStartM, gaugeEndM }: SurveyVisit): CastCells {
  return {
    visit_id: id,
    stick_mm: to(kit.stickSpacingM * 1000, 1),
    pull_mm: to(kit.pullM * 1000, 1),
    offset_mm: mm(kit.floatOffsetM),
    gauge_mm_start: mm(gaugeStartM),
    gauge_mm_end: mm(gaugeEndM),
  };
}

function observedCells({ pegs, marks }: VisitSite, { pegId, seq, observation: seen }: SurveyCast): CastCells {
  const { aim } = seen;
  return {
    peg: pegs.get(pegId)?.number ?? '',
    seq,
    marker: aim.by === 'mark' ? (marks.get(aim.markId)?.code ?? '') : '',
    offset_deg: aim.by === 'mark' ? aim.offsetDeg : null,
    bearing_method: aim.by === 'mark' ? 'marker_on_plan' : aim.method,
    bearing_deg_magnetic: aim.by === 'mark' ? null : aim.bearingDeg,
    wraps_whole: seen.wrapsWhole,
    wraps_remainder_mm: seen.remainderStated || seen.remainderM > 0 ? to(seen.remainderM * 1000, 1) : null,
    line_text: seen.lineText,
    rod_angle: seen.rodElevationDeg,
    drop: seen.drop,
    drag: seen.drag,
    drag_from_mm: seen.dragLengthM === null ? null : 0,
    drag_to_mm: mm(seen.dragLengthM),
    returned: seen.cameBack?.join(';') ?? null,
    depth_pulls: seen.pulls,
    depth_pulls_again: seen.pullsAgain,
    float_sight: seen.floatSight,
    flags: seen.flags.join(';'),
    note: seen.note,
  };
}

type Reduced = Pick<
  SoundingView,
  'bearingDeg' | 'lineOutM' | 'rangeM' | 'depthAsReadM' | 'depthM' | 'depthSigmaM' | 'bottom' | 'grade'
> & { position: LonLat };

/** What a cast was reduced to. */
export const soundingCells = (sounding: Reduced): CastCells => ({
  bearing_deg_true: to(sounding.bearingDeg, 3),
  line_length_mm: mm(sounding.lineOutM),
  line_length_m: m(sounding.lineOutM),
  horizontal_mm: mm(sounding.rangeM),
  horizontal_m: m(sounding.rangeM),
  depth_mm: mm(sounding.depthAsReadM),
  depth_m: m(sounding.depthAsReadM),
  depth_at_datum_mm: mm(sounding.depthM),
  depth_at_datum_m: m(sounding.depthM),
  depth_at_datum_ft: sounding.depthM === null ? null : to(sounding.depthM / FOOT_M, 2),
  depth_sigma_m: m(sounding.depthSigmaM),
  bottom: sounding.bottom,
  grade: sounding.grade,
  lat: to(sounding.position[1], 8),
  lon: to(sounding.position[0], 8),
});
