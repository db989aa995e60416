import { expect, test } from 'vitest';
import { playwrightSum, stageSum, total, unsteadyNames, vitestSum } from './stages.mjs';

const stage = { name: 'unit', tool: 'vitest', args: [], countIn: vitestSum };

test('counted tests are summed as the report says', () => {
  const report = {
    numPassedTests: 12,
    numFailedTests: 2,
    numPendingTests: 1,
    numTodoTests: 1,
    testResults: [],
  };
  expect(stageSum(stage, 1, report)).toEqual({ passed: 12, failed: 2, skipped: 2 });
});

test('a file that breaks before its first test counts as one failure', () => {
  const report = {
    numPassedTests: 3,
    numFailedTests: 0,
    testResults: [{ status: 'failed', assertionResults: [] }],
  };
  expect(stageSum(stage, 1, report)).toEqual({ passed: 3, failed: 1, skipped: 0 });
});

test('a stage that crashes without a report, runs nothing, or ends badly in silence is a failure', () => {
  expect(stageSum(stage, 139, undefined).failed).toBe(1);
  expect(stageSum(stage, 0, { numPassedTests: 0 }).failed).toBe(1);
  expect(stageSum(stage, 1, { numPassedTests: 9 })).toEqual({ passed: 9, failed: 1, skipped: 0 });
});

test('a stage without a count is one check', () => {
  const lint = { name: 'lint', tool: 'eslint', args: [] };
  expect(stageSum(lint, 0, undefined)).toEqual({ passed: 1, failed: 0, skipped: 0 });
  expect(stageSum(lint, 2, undefined)).toEqual({ passed: 0, failed: 1, skipped: 0 });
});

test('a journey that passes only at a second try passes, and an error outside every test is a failure', () => {
  const report = {
    stats: { expected: 4, unexpected: 1, flaky: 1, skipped: 2 },
    errors: [{ message: 'no ground' }],
  };
  expect(playwrightSum(report)).toEqual({ passed: 5, failed: 2, skipped: 2 });
});

test('what passed only at a second try is named', () => {
  const output =
    '  2 flaky\n    [phone] › a.spec.ts:1:1 › one \n    [wide] › b.spec.ts:2:1 › two \n  49 passed (3.6m)\n';
  expect(unsteadyNames(output)).toEqual(['[phone] › a.spec.ts:1:1 › one', '[wide] › b.spec.ts:2:1 › two']);
  expect(unsteadyNames('  51 passed (3.6m)\n')).toEqual([]);
});

test('the total adds every stage', () => {
  const sums = [
    { passed: 1, failed: 0, skipped: 0 },
    { passed: 40, failed: 2, skipped: 1 },
  ];
  expect(total(sums)).toEqual({ passed: 41, failed: 2, skipped: 1 });
});
