import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { angleIn, decimalMarksOf, instantIn, numberWith, unitInName } from './log-numbers';

const lat = (text: string) => angleIn(text, { axis: 'lat', mark: 'point' });
const lon = (text: string) => angleIn(text, { axis: 'lon', mark: 'point' });

describe('an angle', () => {
  test.each([
    ['52.3651', 52.3651],
    ['-52.3651', -52.3651],
    ['\u22121.5', -1.5],
    ['52°21.906′N', 52.3651],
    ['N 52 21.906', 52.3651],
    ['52 21 54.36 S', -52.3651],
    ['52°21′54.36″ N', 52.3651],
    ['52:21:54.36', 52.3651],
  ])('%s is read', (text, degrees) => {
    expect(lat(text)).toBeCloseTo(degrees, 9);
  });

  test.each([
    '',
    'N',
    '52 61 N',
    '52.5 21 N',
    '-52 N',
    '91',
    '52 E',
    '52,3651',
    '52 21 54 3',
    '52 -21',
    'NaN',
    '1e3',
  ])('“%s” is none', (text) => {
    expect(lat(text)).toBeNull();
  });

  test('with a decimal comma is read when the file uses one', () => {
    expect(angleIn('1°8,562′W', { axis: 'lon', mark: 'comma' })).toBeCloseTo(-1.1427, 9);
  });

  test('comes back from degrees, minutes and seconds', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 179 * 36_000 }), fc.constantFrom('E', 'W'), (tenths, side) => {
        const [degrees, minutes, seconds] = [
          Math.floor(tenths / 36_000),
          Math.floor(tenths / 600) % 60,
          (tenths % 600) / 10,
        ];
        const read = lon(`${degrees}° ${minutes}' ${seconds}" ${side}`) ?? NaN;
        expect(read).toBeCloseTo((side === 'W' ? -tenths : tenths) / 36_000, 9);
      }),
    );
  });
});

describe('the decimal mark of a table', () => {
  test('is a comma when a place or an undoubted depth has one', () => {
    expect(decimalMarksOf(['52,365'], ['1,234'])).toMatchObject({ places: 'comma', depths: 'comma' });
    expect(decimalMarksOf(['52.365'], ['1,234', '2,4'])).toMatchObject({ places: 'point', depths: 'comma' });
    expect(decimalMarksOf(['52.365'], ['0,234'])).toMatchObject({ depths: 'comma' });
  });

  test('is not guessed at where 1,234 may be either', () => {
    expect(decimalMarksOf(['52.365'], ['1,234', '12'])).toEqual({
      places: 'point',
      depths: null,
      doubt: '1,234',
    });
  });
});

test('marks between thousands are never taken for decimals', () => {
  expect([
    numberWith('1,234.5', 'point'),
    numberWith('1.234,5', 'comma'),
    numberWith('1 234', 'point'),
  ]).toEqual([null, null, null]);
});

test('a name tells its unit', () => {
  const names = ['depth_ft', 'Depth (feet)', 'depth m', 'Depth [fathoms]', 'depth', 'shift'];
  expect(names.map(unitInName)).toEqual(['ft', 'ft', 'm', 'fathom', null, null]);
});

test('a time is an instant of a day that there is, in its zone', () => {
  expect(instantIn('2027-04-03T09:40:00+01:00')).toEqual({
    ms: Date.parse('2027-04-03T08:40:00Z'),
    zoned: true,
  });
  expect(instantIn('2027-04-03 09:40')).toEqual({ ms: Date.parse('2027-04-03T09:40:00Z'), zoned: false });
  expect(instantIn('2027-04-03T09:40:00.25Z')?.ms).toBe(Date.parse('2027-04-03T09:40:00.250Z'));
  expect(['2027-02-30T09:40:00Z', '2027-04-03T25:00:00Z', '03/04/2027 09:40'].map(instantIn)).toEqual([
    null,
    null,
    null,
  ]);
});
