import { expect, test } from 'vitest';
import { gate, GateFull } from './gate';

function held(): { open: () => void; closed: Promise<void> } {
  let open: () => void = () => {};
  const closed = new Promise<void>((done) => (open = done));
  return { open, closed };
}

const turnOfTheLoop = () => new Promise((done) => setImmediate(done));

test('no more than its places are in at once, and the rest follow in order', async () => {
  const pass = gate(2, 10);
  const holds = [held(), held(), held(), held()];
  const began: number[] = [];
  const works = holds.map(({ closed }, index) =>
    pass(async () => {
      began.push(index);
      await closed;
      return index;
    }),
  );
  await turnOfTheLoop();
  expect(began).toEqual([0, 1]);
  holds[1]?.open();
  await turnOfTheLoop();
  expect(began).toEqual([0, 1, 2]);
  for (const { open } of holds) open();
  expect(await Promise.all(works)).toEqual([0, 1, 2, 3]);
});

test('a failure gives its place back', async () => {
  const pass = gate(1, 1);
  await expect(pass(() => Promise.reject(new RangeError('no')))).rejects.toThrow(RangeError);
  expect(await pass(async () => 'in')).toBe('in');
});

test('a full queue turns the next away at once', async () => {
  const pass = gate(1, 1);
  const hold = held();
  const works = [pass(() => hold.closed), pass(() => hold.closed)];
  await expect(pass(() => hold.closed)).rejects.toThrow(GateFull);
  hold.open();
  await Promise.all(works);
});
