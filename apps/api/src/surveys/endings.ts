import { BottomEvent } from '@mereward/db/entities/surveys/bottom-event';
import type { Lake } from '@mereward/db/entities/lakes/lake';
import { outlineInPlane } from '@mereward/shared/geometry/outline';
import type { BottomEnding } from '@mereward/shared/surveys/bottom-ending';
import { IsNull, type EntityManager } from 'typeorm';
import { originOfLake } from '../lakes/found';

/** The events of a lake that still stand, oldest first. */
export const eventsOf = (tx: EntityManager, lakeId: string): Promise<BottomEvent[]> =>
  tx.find(BottomEvent, {
    where: { lakeId, takenBackAt: IsNull() },
    order: { happenedOn: 'ASC', id: 'ASC' },
  });

/** The same, as evidence is held against them: areas in the lake's plane. */
export async function endingsOf(tx: EntityManager, lake: Lake): Promise<BottomEnding[]> {
  const origin = originOfLake(lake);
  const events = await eventsOf(tx, lake.id);
  return events.map(({ id, kind, area, happenedOn, ends }) => ({
    id,
    kind,
    area: area && outlineInPlane(origin, area),
    happenedOn,
    ends,
  }));
}
