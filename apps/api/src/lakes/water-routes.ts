import { LakeWaters, PutWaterArea } from '@mereward/shared/lakes/peg-water-contract';
import { deed, read, type Route } from '../http/route';
import { lakeWaters } from './peg-waters';
import { putWaterArea, removeWaterArea } from './water-areas';

export const waterRoutes: Route[] = [
  read(
    {
      method: 'get',
      path: '/lakes/:lakeId/waters',
      summary: 'Whose water every part of a lake is',
      signIn: 'open',
      answer: LakeWaters,
    },
    (ctx, { id }) => lakeWaters(ctx, id('lakeId')),
  ),
  deed(
    {
      method: 'put',
      path: '/lakes/:lakeId/water-areas/:areaId',
      summary: 'Give a drawn area to a peg, or to nobody',
      signIn: 'needed',
      body: PutWaterArea,
      answer: LakeWaters,
    },
    async (ctx, { id, body }) => {
      await putWaterArea(ctx, { lakeId: id('lakeId'), areaId: id('areaId') }, body);
      return lakeWaters(ctx, id('lakeId'));
    },
  ),
  deed(
    {
      method: 'delete',
      path: '/lakes/:lakeId/water-areas/:areaId',
      summary: 'Take a drawn area away',
      signIn: 'needed',
      answer: LakeWaters,
    },
    async (ctx, { id }) => {
      await removeWaterArea(ctx, { lakeId: id('lakeId'), areaId: id('areaId') });
      return lakeWaters(ctx, id('lakeId'));
    },
  ),
];
