import { expect, test } from 'vitest';
import { chartCaution, overheadCaution } from './cautions';

const line = {
  kind: 'present',
  distanceM: 22,
  heightM: null,
  operator: '',
  signFitted: false,
  fishing: 'ok',
} as const;

test('a chart says when it was surveyed and at which level', () => {
  const words = chartCaution({ surveyedFrom: '2027-04-03', surveyedTo: '2027-04-03', datumM: 0.62 });
  expect(words).toContain('on 3 Apr 2027, given at level 0.62 m');
  expect(words).toContain('Not for boating, wading, swimming or diving');
  const later = { surveyedFrom: '2027-04-03', surveyedTo: '2027-04-10', datumM: 0.62 };
  expect(chartCaution(later)).toContain('between 3 Apr 2027 and 10 Apr 2027');
  expect(chartCaution(later)).toMatch(/^Bottom and depth come from casting between/);
  expect(chartCaution({ ...later, surveyedBy: 'logs' })).toMatch(/^Depths come from an echo sounder between/);
});

test('a power line nearer than thirty metres is never passed over', () => {
  expect(overheadCaution({ overheadLine: line })).toContain('22 m from this peg. Restricted');
  expect(overheadCaution({ overheadLine: { ...line, fishing: 'no_fishing' } })).toContain(
    'Do not fish here.',
  );
  expect(overheadCaution({ overheadLine: { ...line, distanceM: null } })).toContain('Restricted');
});

test('a line not looked for is said to be unknown, and none is silent', () => {
  expect(overheadCaution({ overheadLine: { ...line, kind: 'unknown' } })).toContain('has not been looked at');
  expect(overheadCaution({ overheadLine: { ...line, kind: 'none' } })).toBeNull();
});
