import { samplePoints, type SamplePoints } from '@mereward/shared/charts/sample-points';
import type { Built } from './built';

/** What a chart's contours were kriged from. `without`: a chart whose casts and logs are no new word, and are left aside. */
export function soundedBed(built: Built, without?: Built): SamplePoints {
  const told = new Set(
    [...(without?.soundings ?? []), ...(without?.logs ?? []), ...built.leftOut].map(({ id }) => id),
  );
  const casts = built.soundings
    .filter(({ id, grade }) => isContoured(grade) && !told.has(id))
    .map(({ xM, yM, depthM, sigmaM }) => [xM, yM, depthM, sigmaM * sigmaM]);
  const ofLogs = built.logs
    .filter(({ id }) => !told.has(id))
    .flatMap(({ points, grades }) =>
      [...grades].flatMap((grade, i) => {
        const [xM = 0, yM = 0, depthM = 0, sigmaM = 0] = points.slice(4 * i, 4 * i + 4);
        return isContoured(grade) ? [[xM, yM, depthM, sigmaM * sigmaM]] : [];
      }),
    );
  return samplePoints([...casts, ...ofLogs]);
}

const isContoured = (grade: string): boolean => grade === 'A' || grade === 'B';
