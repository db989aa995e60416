import type { Units } from '@mereward/shared/accounts/contract';
import type { ChartView } from '@mereward/shared/charts/contract';
import type { ShownLayers } from './chart-layers';

export type ChartFileKind = 'png' | 'svg' | 'geojson';

export type ChartFileTerms = {
  chart: ChartView;
  kind: ChartFileKind;
  units: Units;
  shown: ShownLayers;
  blackAndWhite: boolean;
};

/** "far-ostle-chart-2027.1.svg" */
export function chartFileName({ chart, kind, blackAndWhite }: ChartFileTerms): string {
  const lake = chart.lakeName
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-|-$/g, '');
  return `${lake || 'lake'}-chart-${chart.version ?? 'draft'}${blackAndWhite ? '-print' : ''}.${kind}`;
}
