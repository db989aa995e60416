import { useMemo } from 'react';
import { outlineInPlane } from '@mereward/shared/geometry/outline';
import { pointAlong, toPlane } from '@mereward/shared/geometry/plane';
import { insideOutline } from '@mereward/shared/geometry/polygon';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { facingDeg } from '@mereward/shared/lakes/peg-rules';
import type { CastView, Reduced } from '@mereward/shared/surveys/contract';
import { lineAWrapM } from '@mereward/shared/surveys/line-out';
import { arcCells } from '@mereward/shared/surveys/peg-arc';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { SvgPicture } from '@/components/svg-picture';
import { arcSketchSvg } from '@/features/surveys/arc-sketch';
import type { Surroundings } from '@/features/surveys/cast-site-of';
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
    () => (surroundings ? groundOf(lake, casts, surroundings) : null),
    [lake, casts, surroundings],
  );
  if (!ground) return null;
  const covered = ground.cells.filter((cell) => cell.casts > 0).length;
  const share = ground.cells.length === 0 ? 0 : covered / ground.cells.length;
  const at = now?.ok ? { xM: now.sounding.xM, yM: now.sounding.yM } : null;
  return (
    <Section title="Where the casts fall">
      <SvgPicture svg={arcSketchSvg({ ...ground, now: at }, colours)} />
      <Text>
        {`${percent(share)} of this peg’s arc is covered by ${ground.casts.length} casts; a chart asks for 60 %.`}
      </Text>
      <Text size="small" tone="inkSoft">
        Full dots grade A, rings B, triangles C, crosses D. The dashed line is the cast being typed.
      </Text>
    </Section>
  );
}

function groundOf(lake: LakeView, casts: readonly CastView[], { peg, visit }: Surroundings) {
  const outline = outlineInPlane(lake.origin, lake.details.outline);
  const stance = toPlane(lake.origin, peg.details.origin);
  const reachM = Math.min(peg.details.longestCastM ?? Infinity, lake.details.longestCastM);
  const soundings = casts.flatMap(({ pegId, lineId, reduced }) =>
    pegId === peg.id && reduced.ok ? [{ ...reduced.sounding, lineId }] : [],
  );
  const cells = arcCells(
    {
      arcFromDeg: peg.details.arcFromDeg,
      arcToDeg: peg.details.arcToDeg,
      longestCastM: reachM,
      lineAWrapM: lineAWrapM(visit.kit),
      isWater: ({ bearingDeg, rangeM }) => insideOutline(outline, pointAlong(stance, bearingDeg, rangeM)),
    },
    soundings,
  );
  return { outline, stance, facingDeg: facingDeg(peg.details), reachM, cells, casts: soundings };
}
