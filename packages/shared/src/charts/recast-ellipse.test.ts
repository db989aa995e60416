import { expect, test } from 'vitest';
import { recastEllipse } from './recast-ellipse';

test('close in a cast errs along its line, far out across it', () => {
  expect(recastEllipse(40, 20)).toEqual({ semiMajorM: 1, semiMinorM: 0.4, bearingDeg: 40 });
  expect(recastEllipse(300, 100)).toEqual({ semiMajorM: 2, semiMinorM: 1, bearingDeg: 30 });
});
