import { useCallback, useMemo, useState } from 'react';
import type { ChartView } from '@mereward/shared/charts/contract';
import type { Point } from '@mereward/shared/geometry/point';
import { useChanges, useFeatures, usePatches, useWaters } from './chart-answers-api';
import { shownTales } from './chart-tales';
import type { Draw } from './lake-canvas';
import { changeTale, featureTale, patchTale, taleAt, type Tale } from './tale';
import { taleMarks } from './tale-marks';
import { waterMarks } from './water-marks';

/** What the chart tells beyond its layers, as far as the reader asked for it: read, chosen from, drawn. */
export function useTales(chart: ChartView, pegId: string | null) {
  const shown = shownTales.use();
  const [since, setSince] = useState<string | null>(null);
  const [chosenKey, setChosenKey] = useState<string | null>(null);
  const features = useFeatures(chart.id, shown.features);
  const patches = usePatches(chart.id, shown.patches);
  const changes = useChanges(chart.id, since, shown.changes);
  const waters = useWaters(chart.lakeId, shown.waters);
  const tales = useMemo(
    (): Tale[] => [
      ...(shown.features ? (features.data?.features ?? []).map(featureTale) : []),
      ...(shown.patches ? (patches.data?.patches ?? []).map(patchTale) : []),
      ...(shown.changes ? (changes.data?.areas ?? []).map(changeTale) : []),
    ],
    [shown, features.data, patches.data, changes.data],
  );
  const ownWaters = shown.waters ? waters.data?.pegs : undefined;
  const draw = useCallback<Draw>(
    ({ palette, view }) => [
      ...waterMarks(ownWaters ?? [], palette, pegId),
      ...taleMarks(tales, { palette, view, chosenKey }),
    ],
    [tales, ownWaters, chosenKey, pegId],
  );
  return {
    shown,
    features,
    patches,
    changes,
    waters,
    tales,
    draw,
    since,
    setSince,
    chosen: tales.find(({ key }) => key === chosenKey) ?? null,
    choose: setChosenKey,
    touch: (place: Point): void => setChosenKey(taleAt(tales, place)?.key ?? null),
  };
}

export type Tales = ReturnType<typeof useTales>;
