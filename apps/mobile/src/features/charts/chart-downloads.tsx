import { useState } from 'react';
import type { ChartView } from '@mereward/shared/charts/contract';
import { Button } from '@/components/button';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { useChartUnits } from './use-chart-units';
import { chartFile, type ChartFileKind } from './chart-file';
import { shownLayers } from './chart-layers';
import { sheetPapers, staffPapers } from './chart-papers';
import { PaperButtons } from '@/components/paper-buttons';

const kinds: readonly { kind: ChartFileKind; label: string; bw: boolean }[] = [
  { kind: 'png', label: 'Picture (PNG)', bw: false },
  { kind: 'svg', label: 'Drawing (SVG)', bw: false },
  { kind: 'svg', label: 'Drawing for black-and-white print', bw: true },
  { kind: 'geojson', label: 'Layers (GeoJSON)', bw: false },
];

/** The chart to take away: only what this reader may see is in the files. */
export function ChartDownloads({ chart }: { chart: ChartView }) {
  const units = useChartUnits();
  const shown = shownLayers.use();
  const [busy, setBusy] = useState<string | null>(null);
  const [problem, setProblem] = useState<unknown>(null);
  const save = async (kind: ChartFileKind, bw: boolean): Promise<void> => {
    setBusy(`${kind}${String(bw)}`);
    setProblem(null);
    try {
      await chartFile({ chart, kind, units, shown, blackAndWhite: bw });
    } catch (fault) {
      setProblem(fault);
    } finally {
      setBusy(null);
    }
  };
  return (
    <Section title="Take the chart away" note="As a sheet with scale, datum, dates and cautions on it.">
      {chart.depth || chart.substrate ? <PaperButtons papers={sheetPapers(chart)} /> : null}
      {kinds.map(({ kind, label, bw }) => (
        <Button
          key={label}
          label={label}
          busy={busy === `${kind}${String(bw)}`}
          busyLabel="Drawing it…"
          onPress={() => void save(kind, bw)}
        />
      ))}
      <ProblemNote problem={problem} />
      {chart.may.report ? <PaperButtons papers={staffPapers(chart)} /> : null}
    </Section>
  );
}
