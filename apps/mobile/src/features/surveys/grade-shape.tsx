import type { Grade } from '@mereward/shared/surveys/contract';
import { StatusShape } from '@/components/status-shape';

const looks = {
  A: { shape: 'dot', tone: 'reed' },
  B: { shape: 'ring', tone: 'water' },
  C: { shape: 'triangle', tone: 'amber' },
  D: { shape: 'cross', tone: 'inkSoft' },
} as const;

/** A cast's grade, by the same shape as in the sketch. */
export const GradeShape = ({ grade }: { grade: Grade }) => (
  <StatusShape shape={looks[grade].shape} tone={looks[grade].tone} word={grade} />
);
