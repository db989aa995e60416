import type { LakeView } from '@mereward/shared/lakes/contract';
import { BY_COMPASS, type CastTyped } from '@/features/surveys/cast-draft';
import { figure } from '@/lib/format';

/** "straight over", "20° left of it". */
export function sideWords(offsetDeg: number): string {
  if (offsetDeg === 0) return 'straight over';
  const places = Number.isInteger(offsetDeg) ? 0 : 1;
  return `${figure(Math.abs(offsetDeg), places)}° ${offsetDeg < 0 ? 'left of it' : 'right of it'}`;
}

/** What is aimed over, and how far beside it. */
export function aimWords({ aim, offsetDeg, compassDeg }: CastTyped, lake: LakeView): [string, string] {
  if (aim === BY_COMPASS) return [compassDeg === '' ? 'By compass' : `Compass ${compassDeg}°`, 'change'];
  const mark = lake.marks.find(({ id }) => id === aim);
  return [mark?.details.name ?? 'Choose a mark', mark ? sideWords(offsetDeg ?? 0) : 'choose'];
}
