import { expect, test } from 'vitest';
import { suggestedTyped, type WoundKit } from './cast-suggestion';

const lake = { marks: [{ id: 'm3', details: { code: 'M3' } }] };
const aKit = (wishes: Partial<WoundKit> = {}): WoundKit => ({
  stickSpacingM: 3.6576,
  stickMeasured: 'along_line',
  stickDiameterM: null,
  wrapReference: 'lead_to_clip',
  lineAlongRodM: 3,
  reelHeightM: 1.2,
  rodElevationDeg: 0,
  lineType: 'braid',
  stretchShare: 0,
  stretchSigmaShare: 0,
  declinationDeg: 0,
  ...wishes,
});

test('a proposed cast is counted on the visit’s own sticks, to the nearest wrap', () => {
  const cast = { rangeM: 51.07, bearingDeg: 12, mark: { code: 'M3', offsetDeg: -3.6 } };
  // trade table: 14 wraps of 12 ft, lead to clip, rod level, over 2.4 m of water lie 51.07 m out
  expect(suggestedTyped(cast, lake, aKit())).toEqual({
    wrapsWhole: 14,
    remainder: '',
    aim: 'm3',
    offsetDeg: -4,
    compassDeg: '',
  });
  expect(suggestedTyped(cast, lake, aKit({ stickSpacingM: 3.048 }))?.wrapsWhole).toBe(17);
});

test('without a mark it is aimed by the compass as it reads, declination taken off', () => {
  const cast = { rangeM: 51.07, bearingDeg: 1, mark: null };
  expect(suggestedTyped(cast, lake, aKit({ declinationDeg: 3 }))).toMatchObject({
    aim: 'compass',
    compassDeg: '358',
  });
  expect(suggestedTyped({ ...cast, rangeM: 1 }, lake, aKit())).toBeNull();
});
