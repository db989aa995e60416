import type { useCast } from './use-cast';
import { BOTTOM_GLYPHS } from '@mereward/shared/charts/drawing/bottom-glyphs';
import { stickWords } from '@mereward/shared/charts/spot-words';
import { View } from 'react-native';
import { Figure } from '@/components/figure';
import { ProblemNote } from '@/components/problem-note';
import { Stepper } from '@/components/stepper';
import { Waiting } from '@/components/waiting';
import { space } from '@/constants/layout';
import { useChartUnits } from './use-chart-units';
import { length } from '@/lib/format';
import { capital } from './peg-words';
import { depthNow } from '@mereward/shared/charts/depth-words';
import { SectionList } from './section-list';
import { SectionPicture } from './section-picture';
import { pointAtLineOut } from './section-words';

type Props = { tool: ReturnType<typeof useCast>; raisedM: number; when: string };

/** The drawn cast in figures: where to, how much line, what lies under its end, and the bed on the way. */
export function CastPanel({ tool, raisedM, when }: Props) {
  const units = useChartUnits();
  const { settled, mostM, section, points, aim } = tool;
  if (!settled) return null;
  const wraps = settled.lineOutM / units.stickSpacingM;
  const end = pointAtLineOut(points, settled.lineOutM);
  const mostWraps = Math.max(1, Math.floor(mostM / units.stickSpacingM));
  return (
    <View style={{ gap: space.medium }}>
      <Stepper
        label="Bearing, degrees from true north"
        value={settled.bearingDeg}
        min={0}
        max={359}
        step={5}
        onChange={(deg) => {
          if (deg !== null && deg >= 0 && deg < 360) aim({ ...settled, bearingDeg: deg });
        }}
      />
      <Stepper
        label={`Wraps of ${stickWords(units.stickSpacingM)}`}
        value={Math.round(wraps * 10) / 10}
        min={1}
        max={mostWraps}
        step={1}
        note={`${length(settled.lineOutM, units)} of line`}
        onChange={(count) => {
          if (count !== null && count >= 1 && count <= mostWraps)
            aim({ ...settled, lineOutM: count * units.stickSpacingM });
        }}
      />
      {section.error ? <ProblemNote problem={section.error} onRetry={() => void section.refetch()} /> : null}
      {section.isPending && !section.error ? <Waiting words="Reading the section…" /> : null}
      {end ? (
        <>
          <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.large }}>
            <Figure
              figure={end.depthM === null ? 'not surveyed' : depthNow(end.depthM + raisedM, units.length)}
              caption={
                end.sigmaM === null ? when : `${when}, ± ${length(Math.max(0.1, 1.96 * end.sigmaM), units)}`
              }
            />
            {end.bottom ? (
              <Figure
                figure={capital(end.bottom === 'clear' ? 'clear' : BOTTOM_GLYPHS[end.bottom].words)}
                caption="bottom there"
              />
            ) : null}
          </View>
          <SectionPicture
            points={points}
            raisedM={raisedM}
            markLineOutM={settled.lineOutM}
            label="The bed along this cast; the list below says the same."
          />
          <SectionList points={points} raisedM={raisedM} />
        </>
      ) : null}
    </View>
  );
}
