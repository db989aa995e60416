import { useMemo } from 'react';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { inArc } from '@mereward/shared/lakes/peg-rules';
import type { CastView, Reduced } from '@mereward/shared/surveys/contract';
import { Section } from '@/components/section';
import { SvgPicture } from '@/components/svg-picture';
import { Text } from '@/components/text';
import { arcGround, shareCovered } from '@/features/surveys/arc-ground';
import { arcSketchSvg } from '@/features/surveys/arc-sketch';
import type { Surroundings } from '@/features/surveys/cast-site-of';
import { GradeKey } from '@/features/surveys/grade-key';
import { countWords } from '@/features/surveys/visit-words';
import { useTheme } from '@/hooks/use-theme';
import { percent } from '@/lib/format';

type Props = {
  lake: LakeView;
  casts: readonly CastView[];
  surroundings: Surroundings | null;
  now: Reduced | null;
};

/** Where this peg's casts fall, and how much of its arc they cover. */
export function CastSketch({ lake, casts, surroundings, now }: Props) {
  const { colours } = useTheme();
  const ground = useMemo(
    () => (surroundings ? arcGround(lake, casts, surroundings) : null),
    [lake, casts, surroundings],
  );
  if (!ground) return null;
  const at = now?.ok ? { xM: now.sounding.xM, yM: now.sounding.yM } : null;
  return (
    <Section title="Where the casts fall">
      <SvgPicture svg={arcSketchSvg({ ...ground, now: at }, colours)} />
      <Text size="small">{coverWords(shareCovered(ground), ground.casts.length)}</Text>
      {now?.ok && surroundings && !inArc(surroundings.peg.details, now.sounding.bearingDeg) ? (
        <Text size="small" tone="amber" weight="semibold">
          The cast being typed falls outside this peg’s arc: it is kept, but covers nothing of it.
        </Text>
      ) : null}
      <GradeKey now={at !== null} />
    </Section>
  );
}

/** A chart asks for 60 % of a peg's arc. */
const coverWords = (share: number, casts: number): string =>
  `${countWords(casts, 'cast')} ${casts === 1 ? 'reaches' : 'reach'} ${percent(share)} of this peg’s arc; a chart asks for 60 %.`;
