import type { Units } from '@mereward/shared/accounts/contract';
import { useMemo } from 'react';
import { useUnits } from '@/hooks/use-units';
import { shownLayers } from './chart-layers';

/** The reader's units, with the chart's own switch between metres and feet on top. */
export function useChartUnits(): Units {
  const units = useUnits();
  const { otherUnit } = shownLayers.use();
  return useMemo(
    () => (otherUnit ? { ...units, length: units.length === 'm' ? 'ft' : 'm' } : units),
    [units, otherUnit],
  );
}
