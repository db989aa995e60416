import { USUAL_LOG_OPTIONS, type LogOptions } from '@mereward/shared/surveys/log-contract';
import { expect, test } from 'vitest';
import { LogDraft, logOptionsOf, typedLog } from './log-draft';

test('options come back from the form as they went in', () => {
  const given: LogOptions[] = [
    USUAL_LOG_OPTIONS,
    {
      ...USUAL_LOG_OPTIONS,
      depthFrom: 'property:depth_ft',
      depthMeans: 'bed_height',
      waterHeightM: 61.5,
      depthUnit: 'ft',
      columns: { lat: 0, lon: 1, depth: 4 },
      decimal: 'comma',
      depthSigmaShare: 0.015,
      positionSigmaM: 0.5,
      level: 'at_start',
    },
  ];
  for (const options of given) expect(logOptionsOf(LogDraft.parse(typedLog(options)))).toEqual(options);
});

test('a figure out of bounds is refused with its bounds', () => {
  const typed = { ...typedLog(USUAL_LOG_OPTIONS), transducer: '12' };
  expect(LogDraft.safeParse(typed).error?.issues[0]?.message).toBe(
    'The depth of the transducer is a number from 0 to 5 m',
  );
});
