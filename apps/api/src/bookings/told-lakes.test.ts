import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import { tellingLakes } from './told-lakes';

beforeEach(() => void vi.useFakeTimers());
afterEach(() => void vi.useRealTimers());

test('a lake’s first change is told at once, and all that follow within a second as one more', () => {
  const told: string[] = [];
  const lakes = tellingLakes((lakeId) => told.push(lakeId));
  for (let times = 0; times < 40; times += 1) lakes.changed('far');
  lakes.changed('pool');
  expect(told).toEqual(['far', 'pool']);
  vi.advanceTimersByTime(1000);
  expect(told).toEqual(['far', 'pool', 'far']);
  vi.advanceTimersByTime(5000);
  lakes.changed('far');
  expect(told).toEqual(['far', 'pool', 'far', 'far']);
});

test('stopped, it tells nothing more', () => {
  const told: string[] = [];
  const lakes = tellingLakes((lakeId) => told.push(lakeId));
  lakes.changed('far');
  lakes.changed('far');
  lakes.stop();
  vi.advanceTimersByTime(5000);
  expect(told).toEqual(['far']);
});
