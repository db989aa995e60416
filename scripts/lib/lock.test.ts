import { existsSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { alone, tryLock } from './lock.mjs';

let folder = '';
beforeEach(() => (folder = mkdtempSync(join(tmpdir(), 'lock-'))));
afterEach(() => rmSync(folder, { recursive: true, force: true }));

test('a lock is held once and can be taken again when it is let go', () => {
  const file = join(folder, 'lock');
  const release = tryLock(file);
  expect(release).toBeDefined();
  expect(tryLock(file)).toBeUndefined();
  release?.();
  expect(existsSync(file)).toBe(false);
  expect(tryLock(file)).toBeDefined();
});

test('a lock left by a process that is gone, or whose number a stranger has, holds nobody back', () => {
  const file = join(folder, 'lock');
  for (const leftBehind of ['2147483646', String(process.ppid), 'not a number']) {
    writeFileSync(file, leftBehind);
    const release = tryLock(file);
    expect(release).toBeDefined();
    release?.();
  }
});

test('work under a lock waits its turn and lets go when it fails', async () => {
  const file = join(folder, 'lock');
  const order: string[] = [];
  const first = alone(
    file,
    () => undefined,
    async () => {
      order.push('first begins');
      await new Promise((resolve) => setTimeout(resolve, 50));
      order.push('first ends');
      throw new Error('no disk');
    },
  );
  const notes: string[] = [];
  const second = alone(
    file,
    (text) => notes.push(text),
    () => Promise.resolve(order.push('second')),
  );
  await expect(first).rejects.toThrow('no disk');
  await second;
  expect(order).toEqual(['first begins', 'first ends', 'second']);
  expect(notes).toEqual(['waiting for another run of this checkout (lock)']);
});
