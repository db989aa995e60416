export type Figures = {
  name: string;
  ours: number;
  /** What it is held against, measured in the same run or a fixed floor. */
  other: { name: string; figure: number };
  goal: string;
};

const written = (figure: number): string => (figure >= 100 ? figure.toFixed(0) : figure.toFixed(2));

/** One line: name, ours, the other, ratio, goal. */
export function benchLine({ name, ours, other, goal }: Figures): string {
  const ratio = (ours / other.figure).toFixed(2);
  return `${name} | ${written(ours)} | ${other.name} ${written(other.figure)} | ratio ${ratio} | goal ${goal}`;
}
