import type { SurveyedBy } from '@mereward/shared/charts/chart-log-view';
import type { Paper } from '@/components/paper-buttons';

type Named = { id: string; lakeName: string; version: string | null };
type Surveyed = Named & { surveyedBy?: SurveyedBy | undefined }; // absent until it is built

const slug = (words: string): string =>
  words
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-|-$/g, '') || 'lake';

const named = ({ lakeName, version }: Named, what: string): string =>
  `${slug(lakeName)}-${what}-${version ?? 'draft'}`;

/** The chart true to scale, to print and laminate. */
export const sheetPapers = (chart: Named): Paper[] =>
  (['a4', 'a3'] as const).map((size) => ({
    label: `Sheet to print, ${size.toUpperCase()} (PDF)`,
    path: `/charts/${chart.id}/sheet.pdf?size=${size}`,
    name: `${named(chart, 'chart')}-${size}.pdf`,
  }));

/** What only the fishery's staff may take away: raw casts are theirs. */
export const staffPapers = (chart: Surveyed): Paper[] => [
  {
    label: 'Survey report (PDF)',
    path: `/charts/${chart.id}/report.pdf`,
    name: `${named(chart, 'report')}.pdf`,
  },
  {
    label: 'Every cast (CSV)',
    path: `/charts/${chart.id}/casts.csv`,
    name: `${named(chart, 'casts')}.csv`,
  },
  ...((chart.surveyedBy ?? 'casts') === 'casts'
    ? []
    : [
        {
          label: 'Every merged sounding (CSV)',
          path: `/charts/${chart.id}/soundings.csv`,
          name: `${named(chart, 'soundings')}.csv`,
        },
      ]),
  {
    label: 'Digest of the table of casts (SHA-256)',
    path: `/charts/${chart.id}/casts.csv.sha256`,
    name: `${named(chart, 'casts')}.csv.sha256`,
  },
];

export const layersPaper = (chart: Named): Paper => ({
  label: 'Layers (GeoJSON)',
  path: `/charts/${chart.id}/geojson`,
  name: `${named(chart, 'chart')}.geojson`,
});
