import type { CastFlag, Grade } from './contract';

/**
 * Limits of a grade, metres: the σ it asks for along and across the line (`positionM`) and of the depth (`depthM`), common
 * practice, no published source; and how far off 19 casts in 20 are at most, 1.96 σ, which is what people are told. A float
 * pulled a foot at a time is out by up to half a foot, 0.15 m, by the last pull alone, so no σ rule can promise less.
 */
export const GRADE_LIMITS = [
  { grade: 'A', positionM: 1, depthM: 0.15, within95: { positionM: 2, depthM: 0.3 } },
  { grade: 'B', positionM: 2, depthM: 0.3, within95: { positionM: 4, depthM: 0.6 } },
  { grade: 'C', positionM: 4, depthM: 0.6, within95: { positionM: 8, depthM: 1.2 } },
] as const;

/** What a grade stands for, each way and in depth, in words: "19 in 20 within 2 m, depth within 0.3 m". */
export function gradeMeans(grade: Grade): string {
  const limits = GRADE_LIMITS.find((each) => each.grade === grade);
  if (!limits) return 'rougher, or something is missing; staff only';
  const { positionM, depthM } = limits.within95;
  const within = `19 in 20 within ${positionM} m, depth within ${depthM} m`;
  return grade === 'C' ? `${within}; shown as a point, never contoured` : within;
}

/** What the grade of a sounding rests on. */
export type GradeFacts = {
  radialSigmaM: number;
  lateralSigmaM: number;
  depthSigmaM: number | null; // null: no depth was read
  originMarked: boolean;
  mark: 'permanent' | 'tree' | 'pole' | 'temporary' | null; // null: aimed by compass
  braid: boolean;
  level: 'known' | 'far' | 'unknown'; // far: no reading within a fortnight
  remainderStated: boolean;
  depthRepeated: boolean;
  depthByFall: boolean;
  floatSight: 'good' | 'poor' | null;
  flags: readonly CastFlag[];
  bottomDisagrees: boolean;
};

/**
 * Grade A–D with every reason that held it down. Figures first (σ: A ≤ 1 m both ways and 0.15 m, B ≤ 2 m and 0.3 m,
 * C ≤ 4 m and 0.6 m, D more), then caps.
 *
 * A also asks for a marked origin, a permanent mark, braid, a known level and a repeated reading. A reading counts
 * as repeated when the float was read twice within a pull, or when the cast itself can be wound and thrown again to
 * the same place: its remainder was measured, it was thrown from a marked origin over a permanent mark. A bare count
 * of whole wraps can't be repeated closer than a quarter wrap, and so is not A.
 */
export function gradeOf(facts: GradeFacts): { grade: Grade; reasons: string[] } {
  const caps = [...figureCaps(facts), ...conditionCaps(facts)];
  const grade = caps.reduce<Grade>((worst, cap) => (cap.grade > worst ? cap.grade : worst), 'A');
  const reasons = caps
    .filter((cap) => cap.grade !== 'A')
    .map((cap) => `${cap.reason} (no better than ${cap.grade})`);
  return {
    grade,
    reasons:
      reasons.length > 0 ? reasons : ['Marked origin, permanent mark, braid, level known, repeatable count'],
  };
}

type Cap = { grade: Grade; reason: string };

function figureCaps({ radialSigmaM, lateralSigmaM, depthSigmaM }: GradeFacts): Cap[] {
  const position = (sigmaM: number): Grade =>
    GRADE_LIMITS.find(({ positionM }) => sigmaM <= positionM)?.grade ?? 'D';
  const depth = (sigmaM: number): Grade => GRADE_LIMITS.find(({ depthM }) => sigmaM <= depthM)?.grade ?? 'D';
  const caps: Cap[] = [
    { grade: position(radialSigmaM), reason: `Along the line ± ${radialSigmaM.toFixed(2)} m` },
    { grade: position(lateralSigmaM), reason: `Across the line ± ${lateralSigmaM.toFixed(2)} m` },
  ];
  if (depthSigmaM !== null)
    caps.push({ grade: depth(depthSigmaM), reason: `Depth ± ${depthSigmaM.toFixed(2)} m` });
  return caps;
}

function conditionCaps(facts: GradeFacts): Cap[] {
  const caps: Cap[] = [];
  const cap = (when: boolean, grade: Grade, reason: string): void => {
    if (when) caps.push({ grade, reason });
  };
  cap(!facts.originMarked, 'B', 'The peg has no marked origin to stand on');
  cap(facts.mark === null, 'B', 'Aimed by compass, not over a mark');
  cap(facts.mark !== null && facts.mark !== 'permanent', 'B', 'The far-bank mark is not permanent');
  cap(!facts.braid, 'B', 'The line stretches');
  cap(
    !facts.remainderStated && !facts.depthRepeated,
    'B',
    'The remainder was not measured and the reading not repeated',
  );
  cap(facts.level === 'far', 'C', 'The gauge board was not read within a fortnight');
  cap(facts.level === 'unknown', 'D', 'The water level of the visit is not known');
  cap(facts.depthSigmaM === null, 'C', 'No depth was read: this cast tells of the bottom only');
  cap(facts.depthByFall, 'C', 'Depth by a counted fall');
  cap(facts.floatSight === 'poor', 'C', 'The float was seen poorly');
  cap(facts.flags.includes('crosswind'), 'C', 'Crosswind bellied the line');
  cap(facts.flags.includes('slack_line'), 'C', 'The line was slack');
  cap(facts.flags.includes('hit_another_line'), 'C', 'The cast met another line');
  cap(facts.bottomDisagrees, 'C', 'Landing, drag and what came back disagree');
  return caps;
}
