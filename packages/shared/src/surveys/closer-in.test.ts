import { describe, expect, test } from 'vitest';
import { closerIn } from './closer-in';

const sticks = { stickSpacingM: 3.6576, stickMeasured: 'along_line', stickDiameterM: null } as const;
const out = { wrapsWhole: 14, remainderM: 1, remainderStated: true };

describe('winding in for another reading', () => {
  test('two wraps in leave twelve and the same remainder', () => {
    const answer = closerIn(out, { by: 'wraps', wraps: 2 }, sticks);
    if (!answer.ok) throw new Error(answer.reason);
    expect(answer.out.wrapsWhole).toBe(12);
    expect(answer.out.remainderM).toBeCloseTo(1, 9);
    expect(answer.out.remainderStated).toBe(true);
  });

  test('ten turns of 0.8 m take in 8 m', () => {
    const answer = closerIn(out, { by: 'turns', turns: 10, lineATurnM: 0.8 }, sticks);
    if (!answer.ok) throw new Error(answer.reason);
    expect(answer.out.wrapsWhole * 3.6576 + answer.out.remainderM).toBeCloseTo(14 * 3.6576 + 1 - 8, 9);
  });

  test('part wraps judged by eye, or a first count without remainder, are not measured', () => {
    const byEye = closerIn(out, { by: 'wraps', wraps: 1.5 }, sticks);
    const unmeasured = closerIn({ ...out, remainderStated: false }, { by: 'length', lengthM: 4 }, sticks);
    expect(byEye.ok && byEye.out.remainderStated).toBe(false);
    expect(unmeasured.ok && unmeasured.out.remainderStated).toBe(false);
  });

  test.each([
    [{ by: 'wraps', wraps: 0 } as const, /No line was wound in/],
    [{ by: 'length', lengthM: 60 } as const, /60\.0 m was wound in, but only 52\.2 m was out/],
  ])('%j is refused in words', (wound, words) => {
    const answer = closerIn(out, wound, sticks);
    expect(answer.ok ? '' : answer.reason).toMatch(words);
  });
});
