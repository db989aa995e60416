import { expect, test } from 'vitest';
import { playwrightSum, stageSum, total, vitestSum } from './stages.mjs';

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

test('a journey that passes only at a second try is a failure, and so is an error outside every test', () => {
  const report = {
    stats: { expected: 4, unexpected: 1, flaky: 1, skipped: 2 },
    errors: [{ message: 'no ground' }],
  };
  expect(playwrightSum(report)).toEqual({ passed: 4, failed: 3, skipped: 2 });
});

test('the total adds every stage', () => {
  const sums = [
    { passed: 1, failed: 0, skipped: 0 },
    { passed: 40, failed: 2, skipped: 1 },
  ];
  expect(total(sums)).toEqual({ passed: 41, failed: 2, skipped: 1 });
});
