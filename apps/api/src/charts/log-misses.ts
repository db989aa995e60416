import type { LogMissView } from '@mereward/shared/charts/left-out-contract';
import type { LonLat } from '@mereward/shared/geometry/geodesic';
import { fromPlane, type Point } from '@mereward/shared/geometry/plane';
import type { Built } from './built';
import { idOf } from './chart-logs';

const placeOf = (origin: LonLat, place: Point): LogMissView['position'] => {
  const [lon, lat] = fromPlane(origin, place);
  return [lon, lat];
};

type Of = Pick<Built, 'quality' | 'logs' | 'visits' | 'merged' | 'origin'>;

/** The merged soundings of logs a person must look at: those out of line and those among the ten worst, worst first. */
export function logMisses({ quality, logs, visits, merged, origin }: Of): LogMissView[] {
  const flagged = new Set(quality.flagged);
  const missed = new Map([...quality.worst, ...quality.flaggedBy].map((miss) => [miss.id, miss]));
  const mergedOf = new Map(merged.map((place) => [place.id, place]));
  const views = logs.flatMap(({ id: logId, visitId, filenames, points, grades, cellM }) =>
    Array.from(grades, (_, i): LogMissView[] => {
      const miss = missed.get(idOf(logId, i));
      if (!miss) return [];
      const [xM = 0, yM = 0, depthM = 0] = points.slice(4 * i, 4 * i + 3);
      const place = mergedOf.get(miss.id);
      return [
        {
          ...miss,
          flagged: flagged.has(miss.id),
          logId,
          filenames,
          visitTitle: visits.find(({ id }) => id === visitId)?.title ?? '',
          depthM,
          foretoldM: depthM + miss.errorM,
          position: placeOf(origin, { xM, yM }),
          xM,
          yM,
          merged: place
            ? {
                cell: { kind: 'cell', logId, xM: place.xM, yM: place.yM, sideM: cellM },
                fromSeq: place.fromSeq,
                toSeq: place.toSeq,
                count: place.count,
              }
            : null,
        },
      ];
    }).flat(),
  );
  return views.sort((a, b) => b.standardised - a.standardised || (a.id < b.id ? -1 : 1));
}
