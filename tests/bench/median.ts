/** The middle of some figures; of an even number, the lower of the two in the middle. */
export function median(figures: readonly number[]): number {
  const sorted = [...figures].sort((one, other) => one - other);
  const middle = sorted[Math.floor((sorted.length - 1) / 2)];
  if (middle === undefined) throw new RangeError('There is no median of nothing');
  return middle;
}
