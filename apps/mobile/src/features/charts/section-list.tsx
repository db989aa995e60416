import type { SectionPoint } from '@mereward/shared/charts/contract';
import { stickWords } from '@mereward/shared/charts/spot-words';
import { Disclosure } from '@/components/disclosure';
import { Facts } from '@/components/facts';
import { useChartUnits } from './use-chart-units';
import { figure } from '@/lib/format';
import { depthNow } from '@mereward/shared/charts/depth-words';
import { sectionStretches, type SectionStretch } from './section-words';

/** The section said in words, stretch by stretch, for whoever can't see it or would rather read. */
export function SectionList({ points, raisedM }: { points: readonly SectionPoint[]; raisedM: number }) {
  const units = useChartUnits();
  const wraps = (lineOutM: number): string => figure(lineOutM / units.stickSpacingM, 1);
  const depth = ({ shallowestM, deepestM }: SectionStretch): string => {
    if (shallowestM === null || deepestM === null) return 'not surveyed';
    const [from, to] = [depthNow(shallowestM, units.length), depthNow(deepestM, units.length)];
    return from === to ? from : `${from} to ${to}`;
  };
  const facts = sectionStretches(points, raisedM).map((stretch) => ({
    term: `${wraps(stretch.fromLineOutM)} to ${wraps(stretch.toLineOutM)} wraps`,
    fact: stretch.bottom ? `${depth(stretch)}, ${stretch.bottom}` : depth(stretch),
  }));
  return (
    <Disclosure title={`The same as a list, in wraps of ${stickWords(units.stickSpacingM)}`}>
      <Facts facts={facts} />
    </Disclosure>
  );
}
