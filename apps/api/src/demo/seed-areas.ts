import { fromPlane } from '@mereward/shared/geometry/plane';
import type { Ctx } from '../ctx';
import { putWaterArea } from '../lakes/water-areas';
import { FAR_OSTLE_LAKE } from './fishery';
import { demoId } from './random';

/** The lee of the island, kept free of lines for the birds that nest there: corners in Far Ostle's plane. */
const RESERVE = [
  [44, 8],
  [86, 8],
  [90, 48],
  [42, 48],
] as const;

/** An area of Far Ostle drawn by the office and given to nobody. */
export async function seedAreas(ctx: Ctx): Promise<void> {
  const ring = RESERVE.map(([xM, yM]): [number, number] => {
    const [lon, lat] = fromPlane(FAR_OSTLE_LAKE.water.centre, { xM, yM });
    return [Number(lon.toFixed(7)), Number(lat.toFixed(7))];
  });
  await putWaterArea(
    ctx,
    { lakeId: FAR_OSTLE_LAKE.id, areaId: demoId('area FO island') },
    {
      details: { pegId: null, ring, note: 'Round the island: kept free of lines, birds nest there' },
      version: null,
    },
  );
}
