import { GaugeBoard } from '@mereward/db/entities/lakes/gauge-board';
import { Mark } from '@mereward/db/entities/lakes/mark';
import { Peg } from '@mereward/db/entities/lakes/peg';
import { outlineInPlane } from '@mereward/shared/geometry/outline';
import type { EntityManager } from 'typeorm';
import { digestOf } from '../digest';
import { originOfLake } from '../lakes/found';
import { feelInForce } from './bottom-feel';
import type { VisitFound } from './find-visit';
import { leadOfKit } from './kit-lead';
import type { VisitSite } from './reduce-visit';

/** Loads what the casts of a visit are reduced against. */
export async function visitSite(tx: EntityManager, { visit, lake }: VisitFound): Promise<VisitSite> {
  const pegs = await tx.findBy(Peg, { lakeId: lake.id });
  const marks = await tx.findBy(Mark, { lakeId: lake.id });
  const board = await tx.findOneByOrFail(GaugeBoard, { id: visit.boardId });
  const origin = originOfLake(lake);
  return {
    visit,
    lake,
    origin,
    outline: outlineInPlane(origin, lake.details.outline),
    gauge: {
      startAt: visit.startedAt.toISOString(),
      startM: visit.gaugeStartM,
      endAt: visit.endedAt?.toISOString() ?? null,
      endM: visit.gaugeEndM,
      datumM: lake.datumM,
      higherNumberHigherWater: board.details.higherNumberHigherWater,
    },
    pegs: new Map(pegs.map((peg) => [peg.id, peg])),
    marks: new Map(marks.map((mark) => [mark.id, mark])),
    table: await feelInForce(tx, lake.fisheryId),
    lead: await leadOfKit(tx, lake.fisheryId, visit.kit),
  };
}

/** A digest of all that a visit's casts are reduced with: when it differs, they have to be reduced again. */
export function siteDigest({ visit, lake, gauge, origin, pegs, marks, table, lead }: VisitSite): Buffer {
  return digestOf({
    kit: visit.kit,
    lead,
    tables: [table.feel.substrate, table.feel.cover],
    gauge,
    origin,
    outline: lake.details.outline,
    pegs: [...pegs.values()]
      .map(({ id, details }) => [id, details.origin, details.originFixedBy, details.originMarked])
      .sort(),
    marks: [...marks.values()]
      .map(({ id, details }) => [id, details.name, details.position, details.sigmaM, details.permanence])
      .sort(),
  });
}

export const isReducedWith = (site: VisitSite): boolean =>
  site.visit.reducedWith?.equals(siteDigest(site)) === true;
