import { Account } from '@mereward/db/entities/accounts/account';
import type { SurveyCast } from '@mereward/db/entities/surveys/survey-cast';
import type { SurveyVisit } from '@mereward/db/entities/surveys/survey-visit';
import { csvText } from '@mereward/shared/surveys/csv-cells';
import { In } from 'typeorm';
import type { Ctx } from '../ctx';
import { visitToRead } from './find-visit';
import { castsToday } from './reduce-again';
import type { VisitSite } from './reduce-visit';
import { visitSite } from './visit-site';

const COLUMNS = [
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
  'stick_mm',
  'line_length_mm',
  'rod_angle',
  'horizontal_mm',
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
  'float_sight',
  'gauge_mm_start',
  'gauge_mm_end',
  'depth_at_datum_mm',
  'bottom',
  'grade',
  'lat',
  'lon',
  'flags',
  'note',
  'by',
  'at_utc',
  'not_reduced_because',
] as const;

type Cell = string | number | null;
type Row = Partial<Record<(typeof COLUMNS)[number], Cell>>;

const mm = (lengthM: number | null): number | null => (lengthM === null ? null : Math.round(lengthM * 1000));
const to = (value: number, digits: number): number => Number(value.toFixed(digits));

/** The casts of a visit as a table: as observed and as reduced, lengths in millimetres, instants in UTC. */
export async function castsCsv(ctx: Ctx, visitId: string): Promise<{ filename: string; text: string }> {
  const found = await visitToRead(ctx, visitId);
  const site = await visitSite(ctx.tx, found);
  const casts = await castsToday(ctx.tx, site);
  const keepers = await ctx.tx.findBy(Account, { id: In(casts.map((cast) => cast.keptBy)) });
  const names = new Map(keepers.map((person) => [person.id, person.name]));
  const rows = casts.map((cast) => {
    const row: Row = {
      ...visitCells(found.visit),
      ...observedCells(site, cast),
      ...reducedCells(cast),
      by: names.get(cast.keptBy) ?? '',
      at_utc: cast.observedAt.toISOString(),
    };
    return COLUMNS.map((column) => row[column] ?? null);
  });
  const day = found.visit.startedAt.toISOString().slice(0, 10);
  return { filename: `casts-${day}-${visitId.slice(0, 8)}.csv`, text: csvText([COLUMNS, ...rows]) };
}

function visitCells({ id, kit, gaugeStartM, gaugeEndM }: SurveyVisit): Row {
  return {
    visit_id: id,
    stick_mm: to(kit.stickSpacingM * 1000, 1),
    pull_mm: to(kit.pullM * 1000, 1),
    offset_mm: mm(kit.floatOffsetM),
    gauge_mm_start: mm(gaugeStartM),
    gauge_mm_end: mm(gaugeEndM),
  };
}

function observedCells({ pegs, marks }: VisitSite, { pegId, seq, observation: seen }: SurveyCast): Row {
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

function reducedCells({ reduced }: SurveyCast): Row {
  if (!reduced.ok) return { not_reduced_because: reduced.reason };
  const { sounding } = reduced;
  return {
    bearing_deg_true: to(sounding.bearingDeg, 3),
    line_length_mm: mm(sounding.lineOutM),
    horizontal_mm: mm(sounding.rangeM),
    depth_mm: mm(sounding.depthAsReadM),
    depth_at_datum_mm: mm(sounding.depthM),
    bottom: sounding.bottom,
    grade: sounding.grade,
    lat: to(sounding.position[1], 8),
    lon: to(sounding.position[0], 8),
  };
}
