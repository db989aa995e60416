import { existsSync, readFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { toolEnvironment } from './machine.mjs';
import { at, ownFolder } from './paths.mjs';
import { run } from './run.mjs';
import { elapsed } from './steps.mjs';

/** Far beyond what any stage takes: one that hangs becomes a failure and the others still run. */
const stageWithinMs = 40 * 60_000;

/**
 * @typedef {object} Sum
 * @property {number} passed
 * @property {number} failed
 * @property {number} skipped
 */

/**
 * One stage of the checks. With `countIn` it counts what that report says; without, it counts as one.
 * @typedef {object} Stage
 * @property {string} name
 * @property {string} tool a program of the checkout's own packages
 * @property {string[]} args
 * @property {(report: unknown) => Sum} [countIn]
 */

/** @param {string} tool */
const program = (tool) => at('node_modules', '.bin', tool);

/** The report a stage writes, named for it. @param {string} name */
const reportFile = (name) => join(ownFolder('reports'), `${name}.json`);

/** @param {unknown} value @returns {Record<string, unknown>} */
const fields = (value) => Object(value);

/** @param {unknown} value */
const count = (value) => (typeof value === 'number' ? value : 0);

/** A file that broke before its first test has no failed test to show for it: it counts as one. @param {unknown} report @returns {Sum} */
export function vitestSum(report) {
  const { numPassedTests, numFailedTests, numPendingTests, numTodoTests, testResults } = fields(report);
  const files = Array.isArray(testResults) ? testResults.map(fields) : [];
  const broken = files.filter(
    ({ status, assertionResults }) =>
      status === 'failed' &&
      !(Array.isArray(assertionResults) ? assertionResults : []).some(
        (each) => fields(each).status === 'failed',
      ),
  );
  return {
    passed: count(numPassedTests),
    failed: count(numFailedTests) + broken.length,
    skipped: count(numPendingTests) + count(numTodoTests),
  };
}

/** A journey that passed only at a second try has passed; its name is told beside the count. @param {unknown} report @returns {Sum} */
export function playwrightSum(report) {
  const { stats, errors } = fields(report);
  const { expected, unexpected, flaky, skipped } = fields(stats);
  const outside = Array.isArray(errors) ? errors.length : 0;
  return {
    passed: count(expected) + count(flaky),
    failed: count(unexpected) + outside,
    skipped: count(skipped),
  };
}

/** The journeys that passed only at a second try, as the end of the output lists them. @param {string} output @returns {string[]} */
export const unsteadyNames = (output) =>
  /^ *\d+ flaky\n((?: +\[.*\n?)+)/m
    .exec(output)?.[1]
    ?.trim()
    .split(/\s*\n\s*/) ?? [];

/** @param {string} name @returns {unknown} */
function readReport(name) {
  const file = reportFile(name);
  if (!existsSync(file)) return undefined;
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch {
    return undefined;
  }
}

/**
 * What a finished stage comes to: a stage that ended badly has at least one failure, and so has one
 * that should have counted and did not.
 * @param {Stage} stage @param {number} code @param {unknown} report @returns {Sum}
 */
export function stageSum({ countIn }, code, report) {
  if (!countIn)
    return code === 0 ? { passed: 1, failed: 0, skipped: 0 } : { passed: 0, failed: 1, skipped: 0 };
  const sum = report === undefined ? { passed: 0, failed: 1, skipped: 0 } : countIn(report);
  const silent = code !== 0 && sum.failed === 0;
  return silent || (sum.passed === 0 && sum.failed === 0) ? { ...sum, failed: sum.failed + 1 } : sum;
}

/** Runs one stage, says how it went, and shows what it said when it failed. @param {Stage} stage @returns {Promise<Sum>} */
export async function runStage(stage) {
  const startedMs = performance.now();
  rmSync(reportFile(stage.name), { force: true });
  const env = {
    ...toolEnvironment(),
    NODE_ENV: 'test',
    PLAYWRIGHT_JSON_OUTPUT_NAME: reportFile(stage.name),
    PLAYWRIGHT_JSON_OUTPUT_FILE: reportFile(stage.name),
  };
  const { code, output } = await run(program(stage.tool), stage.args, { env, withinMs: stageWithinMs });
  const sum = stageSum(stage, code, stage.countIn ? readReport(stage.name) : undefined);
  const skipped = sum.skipped > 0 ? `, ${sum.skipped} skipped` : '';
  if (sum.failed > 0) process.stdout.write(`\n${output.slice(-20_000)}\n`);
  for (const name of unsteadyNames(output)) process.stdout.write(`  at a second try only: ${name}\n`);
  const sign = sum.failed > 0 ? '✗' : '✓';
  process.stdout.write(
    `${sign} ${stage.name}: ${sum.passed} passed, ${sum.failed} failed${skipped} (${elapsed(startedMs)})\n`,
  );
  return sum;
}

/** @param {Sum[]} sums @returns {Sum} */
export function total(sums) {
  /** @param {'passed' | 'failed' | 'skipped'} key */
  const of = (key) => sums.reduce((before, each) => before + each[key], 0);
  return { passed: of('passed'), failed: of('failed'), skipped: of('skipped') };
}

/** @param {string} name @param {string[]} args @returns {Stage} */
function vitestStage(name, args) {
  const reporters = ['--reporter=dot', '--reporter=json', `--outputFile.json=${reportFile(name)}`];
  return { name, tool: 'vitest', args: ['run', ...args, ...reporters], countIn: vitestSum };
}

export const stages = {
  /** @type {Stage} */
  format: { name: 'format', tool: 'prettier', args: ['--check', '--log-level', 'warn', '.'] },
  /** @type {Stage} */
  lint: { name: 'lint', tool: 'eslint', args: ['--max-warnings', '0', '.'] },
  /** @type {Stage} */
  types: { name: 'types', tool: 'tsc', args: ['-p', 'tsconfig.json'] },
  /** @type {Stage} */
  clientTypes: { name: 'client types', tool: 'tsc', args: ['-p', 'apps/mobile/tsconfig.json'] },
  architecture: vitestStage('architecture', ['--project', 'architecture']),
  unit: vitestStage('unit', ['--project', 'unit']),
  reference: vitestStage('reference', ['--project', 'reference']),
  api: vitestStage('api', ['--project', 'api']),
  /** @type {Stage} */
  journeys: {
    name: 'journeys',
    tool: 'playwright',
    args: ['test', '--reporter=list,json'],
    countIn: playwrightSum,
  },
};
