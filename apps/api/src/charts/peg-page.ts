import { Spot } from '@mereward/db/entities/charts/spot';
import { ageWords, type AgeNow } from '@mereward/shared/charts/chart-age';
import { chartCaution, EMERGENCY, overheadCaution } from '@mereward/shared/charts/cautions';
import type { LayerNotes, PegPageView, SpotView } from '@mereward/shared/charts/contract';
import { RIG_CAUTION } from '@mereward/shared/charts/presentation';
import { toPlane } from '@mereward/shared/geometry/plane';
import type { PegDetails } from '@mereward/shared/lakes/contract';
import { In, type EntityManager } from 'typeorm';
import type { Ctx } from '../ctx';
import { photosOf } from '../files/queries';
import { placeWater, watersOf, type WatersFound } from '../lakes/peg-waters';
import { toldDetails } from '../lakes/queries';
import { surveyedBy } from './built-logs';
import { layersOf } from './chart-layers';
import { changesFor } from './chart-view';
import { pegGround, type PegGround } from './peg-chart';
import { ageAtPeg } from './peg-age';
import { pegExtract } from './peg-extract';
import { spotView } from './spot-view';

/** A page stays light enough for one bar of signal: spots past this many are left to the chart. */
const MOST_SPOTS = 12;
const MOST_NEIGHBOURS = 4; // without their sections, which weigh most

/** What an angler reads of a peg before coming, within what this reader may see. The card is printed from the same. */
export async function pegPage(ctx: Ctx, pegId: string): Promise<PegPageView> {
  const ground = await pegGround(ctx, pegId);
  const { peg, lake, fishery, chart, sight, ticket } = ground;
  const details = toldDetails(ctx.actor, lake, peg.details);
  const photos = await photosOf(ctx.tx, { kind: 'peg', ids: [pegId], staff: sight.staff });
  const { id, version, surveyedFrom, surveyedTo, datumM } = chart ?? {};
  const waters = await watersOf(ctx.tx, lake);
  const seen = sight.sees.spots
    ? await spotsOf(ctx.tx, ground, waters)
    : { spots: null, neighbourSpots: null };
  const told = ageAtPeg({ ground, waters, spots: seen.spots ?? [], now: ctx.now });
  return {
    id: peg.id,
    number: peg.number,
    name: peg.details.name,
    fishery: {
      id: fishery.id,
      name: fishery.name,
      zone: fishery.zone,
      dutyPhone: fishery.details.dutyPhone,
      meetingPoint: fishery.details.meetingPoint,
    },
    lake: {
      id: lake.id,
      name: lake.name,
      emergencyAccess: lake.details.emergencyAccess,
      phoneSignal: lake.details.phoneSignal,
    },
    details,
    photos: photos.get(pegId) ?? [],
    chart:
      id && version && surveyedFrom && surveyedTo && datumM !== undefined && told
        ? {
            id,
            version,
            surveyedFrom,
            surveyedTo,
            datumM,
            age: told.age,
            changes: changesFor(told, sight),
          }
        : null,
    levelNow: ground.levelNow,
    ...seen,
    extract: pegExtract(ground),
    layerNotes: notesOf(ground),
    cautions: cautionsOf(ground, details, told),
    rigCaution: RIG_CAUTION,
    emergencyWords: EMERGENCY,
    cardUrl: `/api/pegs/${peg.id}/card.pdf`,
    shortUrl: `${ctx.publicUrl}/p/${peg.code}`,
    ticket: ticket && { from: ticket.from.toISOString(), until: ticket.until.toISOString() },
  };
}

type Spots = Pick<PegPageView, 'spots' | 'neighbourSpots'>;

/** The peg's own spots, and those of other pegs that lie in its water, all as reached from here. */
async function spotsOf(tx: EntityManager, ground: PegGround, waters: WatersFound): Promise<Spots> {
  const { chart, peg } = ground;
  const open = chart && { chart, layers: layersOf(chart.content) };
  const all = await tx.find(Spot, {
    where: { pegId: In(waters.pegs.map(({ id }) => id)) },
    order: { createdAt: 'ASC', id: 'ASC' },
  });
  const viewOf = (spot: Spot): SpotView | null => {
    const view = spotView(ground, open, spot);
    return view && { ...view, water: waterOf(spot) };
  };
  const waterOf = (spot: Spot) => placeWater(waters, peg.id, toPlane(ground.origin, spot.details.position));
  const own = all.filter((spot) => spot.pegId === peg.id).slice(0, MOST_SPOTS);
  const theirs = all.filter((spot) => spot.pegId !== peg.id && waterOf(spot).own).slice(0, MOST_NEIGHBOURS);
  return {
    spots: own.map(viewOf).filter((view) => view !== null),
    neighbourSpots: theirs.flatMap((spot) => {
      const [view, of] = [viewOf(spot), waters.pegs.find(({ id }) => id === spot.pegId)];
      if (!view || !of) return [];
      return [
        { peg: { id: of.id, number: of.number, name: of.details.name }, spot: { ...view, section: null } },
      ];
    }),
  };
}

const NO_CHART = 'No chart of this water is published yet.';

function notesOf({ chart, sight: { notes } }: PegGround): LayerNotes {
  if (chart) return notes;
  return {
    ...notes,
    depth: notes.depth ?? NO_CHART,
    bottom: notes.bottom ?? NO_CHART,
    soundings: notes.soundings ?? NO_CHART,
  };
}

function cautionsOf({ chart }: PegGround, details: PegDetails, told: AgeNow | null): string[] {
  const overhead = overheadCaution(details);
  const changed =
    told && (told.age === 'changed' || told.age === 'old') ? ageWords(told.age, told.changes) : null;
  return [
    overhead,
    changed && `${changed}.`,
    chart && chartCaution({ ...chart, surveyedBy: surveyedBy(chart.content.built) }),
  ].filter((words) => words !== null);
}
