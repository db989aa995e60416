import type { CastView, SoundingView } from '@mereward/shared/surveys/contract';

/** Below these a change is rounding, not a change. */
const LEAST_M = 0.005;

export type CastChange = {
  id: string;
  seq: number;
  movedM: number | null; // null: not reduced before or after
  depthBeforeM: number | null;
  depthAfterM: number | null;
  bottom: { before: string; after: string } | null; // null: the same
  grade: { before: string; after: string } | null;
};

export type KitEffect = {
  casts: number;
  changed: CastChange[];
  moved: { count: number; meanM: number; mostM: number };
  depths: { count: number; meanM: number; mostM: number }; // mean with its sign: deeper positive
  bottoms: number;
  grades: number;
};

const soundingOf = ({ reduced }: CastView): SoundingView | null => (reduced.ok ? reduced.sounding : null);
const mean = (values: readonly number[]): number =>
  values.length === 0 ? 0 : values.reduce((sum, value) => sum + value, 0) / values.length;

/** What a corrected constant did to the casts of a visit, cast by cast and in all. Lengths in metres. */
export function kitEffect(before: readonly CastView[], after: readonly CastView[]): KitEffect {
  const now = new Map(after.map((cast) => [cast.id, cast]));
  const pairs = before.flatMap((cast) => {
    const later = now.get(cast.id);
    return later ? [changeOf(cast, later)] : [];
  });
  const moved = pairs.flatMap(({ movedM }) => (movedM !== null && movedM >= LEAST_M ? [movedM] : []));
  const deeper = pairs.flatMap(deeperBy);
  return {
    casts: pairs.length,
    changed: pairs.filter(isChanged),
    moved: { count: moved.length, meanM: mean(moved), mostM: Math.max(0, ...moved) },
    depths: { count: deeper.length, meanM: mean(deeper), mostM: Math.max(0, ...deeper.map(Math.abs)) },
    bottoms: pairs.filter(({ bottom }) => bottom !== null).length,
    grades: pairs.filter(({ grade }) => grade !== null).length,
  };
}

function changeOf(before: CastView, after: CastView): CastChange {
  const was = soundingOf(before);
  const is = soundingOf(after);
  const differing = (from: string | null, to: string | null) =>
    from === to ? null : { before: from ?? 'not reduced', after: to ?? 'not reduced' };
  return {
    id: before.id,
    seq: before.seq,
    movedM: was && is ? Math.hypot(is.xM - was.xM, is.yM - was.yM) : null,
    depthBeforeM: was?.depthM ?? null,
    depthAfterM: is?.depthM ?? null,
    bottom: differing(was?.bottom ?? null, is?.bottom ?? null),
    grade: differing(was?.grade ?? null, is?.grade ?? null),
  };
}

function deeperBy({ depthBeforeM, depthAfterM }: CastChange): number[] {
  if (depthBeforeM === null || depthAfterM === null) return [];
  const byM = depthAfterM - depthBeforeM;
  return Math.abs(byM) >= LEAST_M ? [byM] : [];
}

const isChanged = (change: CastChange): boolean =>
  (change.movedM !== null && change.movedM >= LEAST_M) ||
  deeperBy(change).length > 0 ||
  change.bottom !== null ||
  change.grade !== null;
