import { describe, expect, test } from 'vitest';
import { LogPartDraft, logPartOf } from './leave-out-draft';

const logId = 'b7f1e8a0-0000-4000-8000-000000000001';
const cell = { kind: 'cell', logId, xM: 3, yM: -2, sideM: 1 } as const;
const typed = { id: 'x', part: 'run', fromSeq: ' 12', toSeq: '40', reason: 'Weed under the boat' } as const;
const faults = (wishes: object) =>
  LogPartDraft.safeParse({ ...typed, ...wishes }).error?.issues.map(({ path }) => path.join('.'));

describe('a part of a log as typed', () => {
  test('is read as soundings from one to another, both of them', () => {
    const read = LogPartDraft.parse(typed);
    expect(logPartOf(read, { logId, cell })).toEqual({ kind: 'run', logId, fromSeq: 12, toSeq: 40 });
  });

  test('is the cell as it is when that is chosen, whatever stands in the numbers', () => {
    const read = LogPartDraft.parse({ ...typed, part: 'cell', fromSeq: 'x' });
    expect(logPartOf(read, { logId, cell })).toBe(cell);
  });

  test('is refused beside the number that is wrong', () => {
    expect(faults({ fromSeq: '0' })).toEqual(['fromSeq']);
    expect(faults({ fromSeq: '1.5', toSeq: '' })).toEqual(['fromSeq', 'toSeq']);
    expect(faults({ fromSeq: '50' })).toEqual(['toSeq']);
    expect(faults({ reason: ' ' })).toEqual(['reason']);
  });
});
