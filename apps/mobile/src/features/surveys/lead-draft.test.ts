import { expect, test } from 'vitest';
import { LeadDraft, typedCalibration } from './lead-draft';

const typed = {
  name: 'Ball',
  leadG: '85',
  leadShape: 'smooth_ball',
  lineType: 'braid',
  calibratedOn: '2027-04-03',
  note: '',
  falls: [
    { depthM: '1,5', seconds: '1' },
    { depthM: '3', seconds: '2' },
    { depthM: '', seconds: '' },
    { depthM: '4.5', seconds: '3' },
  ],
} as const;

test('rows with nothing in them are not counted, decimal commas are read', () => {
  const read = LeadDraft.parse({ ...typed, falls: [...typed.falls] });
  expect(read.falls).toEqual([
    { depthM: 1.5, seconds: 1 },
    { depthM: 3, seconds: 2 },
    { depthM: 4.5, seconds: 3 },
  ]);
});

test('half a row is refused where it is missing', () => {
  const read = LeadDraft.safeParse({ ...typed, falls: [{ depthM: '2', seconds: '' }] });
  expect(read.error?.issues.map(({ path }) => path.join('.'))).toEqual(['falls.0.seconds']);
});

test('what is typed comes to a rate, or to what is still wanting', () => {
  const comes = typedCalibration(typed.falls);
  expect(comes.ok && comes.calibration.rateMPerS).toBeCloseTo(1.5, 12);
  expect(typedCalibration(typed.falls.slice(0, 2))).toMatchObject({
    ok: false,
    words: expect.stringMatching(/three spots/),
  });
});
