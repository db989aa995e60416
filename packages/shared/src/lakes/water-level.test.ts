import { describe, expect, test } from 'vitest';
import type { GaugeBoardDetails } from './contract';
import { boardFaults, levelOver, levelWarnings, readingM } from './water-level';

const board = (wishes: Partial<GaugeBoardDetails> = {}): GaugeBoardDetails => ({
  code: 'G1',
  kind: 'board',
  position: [0, 0],
  unit: 'm',
  higherNumberHigherWater: true,
  normalLowM: 0.55,
  normalHighM: 0.7,
  alarmLowM: 0.3,
  alarmHighM: 1.1,
  lastCleanedOn: null,
  isDatumBoard: true,
  ...wishes,
});
const hung = board({
  higherNumberHigherWater: false,
  normalLowM: 0.7,
  normalHighM: 0.55,
  alarmLowM: 1.1,
  alarmHighM: 0.3,
});
const read = (levelM: number, day: number) => ({ levelM, at: new Date(Date.UTC(2027, 3, day)) });
const kinds = (...args: Parameters<typeof levelWarnings>) => levelWarnings(...args).map(({ kind }) => kind);

describe('a reading', () => {
  test('in feet is kept in metres', () => {
    expect(readingM(2, 'ft')).toBeCloseTo(0.6096, 12);
    expect(readingM(0.62, 'm')).toBe(0.62);
  });

  test('of a board hung upside down is turned about the datum', () => {
    expect(levelOver(0.8, { higherNumberHigherWater: false }, 0.6)).toBeCloseTo(0.4, 12);
    expect(levelOver(0.6, { higherNumberHigherWater: false }, 0.6)).toBeCloseTo(0.6, 12);
    expect(levelOver(0.8, { higherNumberHigherWater: true }, 0.6)).toBe(0.8);
  });

  test('inside the normal range and near the last one is quiet', () => {
    expect(kinds(board(), read(0.62, 2), read(0.6, 1))).toEqual([]);
    expect(kinds(hung, read(0.62, 2), null)).toEqual([]);
  });

  test.each([
    [1.1, 'alarm_high'],
    [1.09, 'outside_normal'],
    [0.3, 'alarm_low'],
    [0.31, 'outside_normal'],
  ])('of %d m is told as %s', (levelM, kind) => {
    expect(kinds(board(), read(levelM, 2), null)).toEqual([kind]);
  });

  test('of an upside-down board alarms in the sense of the water', () => {
    expect(kinds(hung, read(0.29, 2), null)).toEqual(['alarm_high']);
    expect(kinds(hung, read(1.2, 2), null)).toEqual(['alarm_low']);
  });

  test('more than 0.2 m a day from the last asks to look again', () => {
    const wide = board({ normalLowM: null, normalHighM: null, alarmHighM: null, alarmLowM: null });
    expect(kinds(wide, read(0.85, 2), read(0.62, 1))).toEqual(['jump']);
    expect(kinds(wide, read(0.81, 2), read(0.62, 1))).toEqual([]);
    expect(kinds(wide, read(0.85, 3), read(0.62, 1))).toEqual([]); // 0.115 m a day
    expect(levelWarnings(wide, read(0.3, 2), read(0.62, 1))[0]?.words).toMatch(/0\.32 m less/);
  });

  test('older than the newest says that today’s level stays', () => {
    expect(kinds(board(), read(0.62, 1), read(0.6, 2))).toEqual(['older_than_newest']);
  });
});

describe('limits of a board', () => {
  test('in order pass, on either way of hanging', () => {
    expect(boardFaults(board())).toEqual([]);
    expect(boardFaults(hung)).toEqual([]);
    expect(boardFaults(board({ normalLowM: null }))).toEqual([]);
  });

  test('the wrong way round are named', () => {
    expect(boardFaults(board({ normalHighM: 0.5, alarmHighM: 0.2 })).map(({ field }) => field)).toEqual([
      'normalHighM',
      'alarmHighM',
    ]);
    expect(boardFaults({ ...hung, normalLowM: 0.5 })[0]?.words).toMatch(/higher number is lower water/);
  });
});
