import type { Lake } from '@mereward/db/entities/lakes/lake';
import { ConfirmedBottom } from '@mereward/db/entities/surveys/confirmed-bottom';
import { toPlane } from '@mereward/shared/geometry/plane';
import type { ConfirmedPlace } from '@mereward/shared/surveys/confirmed-pairs';
import { IsNull, type EntityManager } from 'typeorm';
import { originOfLake } from '../lakes/found';

/** The confirmed bottoms of a lake that still stand, in its plane, by id. */
export async function confirmedPlaces(tx: EntityManager, lake: Lake): Promise<ConfirmedPlace[]> {
  const rows = await tx.find(ConfirmedBottom, {
    where: { lakeId: lake.id, takenBackAt: IsNull() },
    order: { id: 'ASC' },
  });
  const origin = originOfLake(lake);
  return rows.map(({ id, castId, lon, lat, positionSigmaM, substrate, cover, method, day }) => ({
    id,
    castId,
    ...toPlane(origin, [lon, lat]),
    sigmaM: positionSigmaM,
    substrate,
    cover,
    method,
    day,
  }));
}
