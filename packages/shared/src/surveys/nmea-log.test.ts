import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { USUAL_LOG_OPTIONS, type LogOptions } from './log-contract';
import { LogFaults, LogRefusal } from './log-point';
import { readNmeaLog } from './nmea-log';
import { checksumOf, readSentence } from './nmea-sentence';

const DAY = Date.parse('2027-04-03T00:00:00Z');

const line = (body: string): string =>
  `$${body}*${checksumOf(body).toString(16).toUpperCase().padStart(2, '0')}`;
/** A fix so many minutes of arc north of 52°, hhmmss. */
const gga = (time: string, minutes: number, quality = 1): string =>
  line(`GPGGA,${time},52${minutes.toFixed(4).padStart(7, '0')},N,00100.0000,W,${quality},9,1.0,60,M,47,M,,`);
const rmc = (time: string, minutes: number, day = '030427'): string =>
  line(`GPRMC,${time},A,52${minutes.toFixed(4).padStart(7, '0')},N,00100.0000,W,1,0,${day},,,A`);
const dpt = (depthM: number, offset = ''): string => line(`SDDPT,${depthM},${offset}`);
const zda = (time: string): string => line(`GPZDA,${time},03,04,2027,00,00`);

function read(files: string[][], wishes: Partial<LogOptions> = {}) {
  const faults = new LogFaults();
  const log = readNmeaLog(
    files.map((lines, i) => ({ name: `${i}.log`, text: lines.join('\r\n') })),
    { ...USUAL_LOG_OPTIONS, ...wishes },
    { faults, visitDayMs: DAY, tell: () => undefined },
  );
  return { ...log, faults };
}
const minutesOf = ({ lat }: { lat: number }): number => (lat - 52) * 60;
const at = (time: string): number => Date.parse(`2027-04-03T${time}Z`);

describe('a depth', () => {
  test('alone between two fixes stands at the first; several are spread evenly over the time between', () => {
    const { points } = read([
      [rmc('090000', 1), dpt(2), gga('090004', 5), dpt(3), dpt(4), dpt(5), dpt(6), gga('090008', 9)],
    ]);
    expect(points.map(({ atMs }) => atMs)).toEqual(
      ['09:00:00', '09:00:04', '09:00:05', '09:00:06', '09:00:07'].map(at),
    );
    expect(points.map((point) => Math.round(minutesOf(point) * 1e6) / 1e6)).toEqual([1, 5, 6, 7, 8]);
    expect(points.map((point) => point.at)).toEqual([2, 4, 5, 6, 7]);
  });

  test('in a file of its own is placed by the fixes of the other, by time', () => {
    const { points, withoutPlace } = read([
      [rmc('090000', 1), gga('090002', 3), gga('090004', 5)],
      [zda('090001'), dpt(2), zda('090003'), dpt(3), zda('090030'), dpt(4)],
    ]);
    expect(points.map((point) => Math.round(minutesOf(point) * 1e6) / 1e6)).toEqual([2, 4]);
    expect(withoutPlace).toBe(1); // half a minute after the last fix
  });

  test('between fixes further apart than the gap has no place', () => {
    const lines = [rmc('090000', 1), dpt(1), dpt(2), gga('090010', 11), dpt(3)];
    expect(read([lines]).points.map(({ depthM }) => depthM)).toEqual([1, 3]);
    expect(read([lines]).withoutPlace).toBe(1);
    expect(read([lines], { gapS: 10 }).points).toHaveLength(3);
  });

  test('counts from the surface where the sentence states how deep the transducer lies, else from the surveyor’s figure', () => {
    const fixes = [rmc('090000', 1)];
    const depths = [
      dpt(2, '0.35'),
      dpt(2, '-0.4'),
      dpt(2),
      line('SDDBT,,f,2.0,M,,F'),
      line('SDDBS,,f,2.0,M,,F'),
    ];
    const { points } = read([[...fixes, ...depths, gga('090005', 6)]], { transducerM: 0.2 });
    expect(points.map(({ depthM }) => Number(depthM.toFixed(6)))).toEqual([2.35, 2.2, 2.2, 2.2, 2]);
  });

  test('before any time is told as without a place', () => {
    expect(read([[dpt(2), rmc('090000', 1)]])).toMatchObject({ points: [], withoutPlace: 1 });
  });
});

describe('a day', () => {
  test('is the last that was stated, and goes on over midnight', () => {
    const { points } = read([
      [gga('235958', 1), dpt(1), rmc('235959', 2), dpt(2), gga('000001', 3), dpt(3), gga('000002', 4)],
    ]);
    expect(points.map(({ atMs }) => new Date(atMs ?? 0).toISOString())).toEqual([
      '2027-04-03T23:59:58.000Z',
      '2027-04-03T23:59:59.000Z',
      '2027-04-04T00:00:01.000Z',
    ]);
  });

  test('nowhere stated is the visit’s, and that is told', () => {
    const { points, cautions } = read([[gga('090000', 1), dpt(1)]]);
    expect(points[0]?.atMs).toBe(at('09:00:00'));
    expect(cautions).toEqual(['The log states no day; the day of the visit was taken.']);
  });
});

test('the error of a place follows the kind of fix, a rare worse one left aside', () => {
  const many = Array.from({ length: 30 }, (_, i) => gga(`0900${String(i).padStart(2, '0')}`, i, 4));
  expect(read([[...many, dpt(1)]]).guessed.positionSigmaM).toBe(0.1);
  expect(read([[...many, gga('090030', 31, 1), dpt(1)]]).guessed.positionSigmaM).toBe(0.1);
  expect(read([[gga('090000', 1, 2), dpt(1)]]).guessed.positionSigmaM).toBe(1.5);
  expect(read([[gga('090000', 1, 1), dpt(1)]], { positionSigmaM: 0.7 }).guessed.positionSigmaM).toBe(0.7);
});

test('a log without places, or without depths, is refused in words that say what to bring', () => {
  expect(() => read([[zda('090000'), dpt(1)]])).toThrow(LogRefusal);
  expect(() => read([[zda('090000'), dpt(1)]])).toThrow(/No line states a place.*bring both together/);
  expect(() => read([[gga('090000', 1)]])).toThrow(/No line states a depth/);
});

test('a damaged digit anywhere between the marks is seen', () => {
  const good = dpt(2.41, '0.35');
  fc.assert(
    fc.property(
      fc.integer({ min: 1, max: good.length - 4 }),
      fc.integer({ min: 33, max: 126 }),
      (i, code) => {
        const letter = String.fromCharCode(code);
        fc.pre(letter !== good[i] && letter !== '*');
        return readSentence(good.slice(0, i) + letter + good.slice(i + 1)).kind === 'fault';
      },
    ),
  );
});

test('feet and metres that are not the same depth are a fault', () => {
  expect(readSentence(line('SDDBT,7.9,f,2.41,M,1.32,F')).kind).toBe('depth');
  expect(readSentence(line('SDDBT,24.1,f,2.41,M,1.32,F'))).toMatchObject({
    kind: 'fault',
    detail: expect.stringMatching(/feet and its metres/),
  });
});
