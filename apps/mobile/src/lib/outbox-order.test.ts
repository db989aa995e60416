import { array, assert, boolean, constantFrom, property, record } from 'fast-check';
import { expect, test } from 'vitest';
import { heldBy, nextToSend, outcomeOf, pauseMs } from './outbox-order';

type State = 'waiting' | 'refused' | 'sent';
const entry = (seq: number, group: string, state: State = 'waiting') => ({ seq, group, state });

test('the oldest goes first, in whatever order they are read', () => {
  expect(nextToSend([entry(3, 'a'), entry(1, 'b'), entry(2, 'a')])?.seq).toBe(1);
});

test('what is sent already is passed by', () => {
  expect(nextToSend([entry(1, 'a', 'sent'), entry(2, 'a')])?.seq).toBe(2);
});

test('a refusal holds what follows in its own visit and nothing of another', () => {
  const entries = [entry(1, 'far', 'refused'), entry(2, 'far'), entry(3, 'pool'), entry(4, 'far')];
  expect(nextToSend(entries)?.seq).toBe(3);
  expect(heldBy(entries, entries[1] ?? entry(0, ''))?.seq).toBe(1);
  expect(heldBy(entries, entries[2] ?? entry(0, ''))).toBeNull();
});

test('what came before a refusal in its visit is not held by it', () => {
  expect(nextToSend([entry(1, 'far'), entry(2, 'far', 'refused')])?.seq).toBe(1);
});

test('what the server fails at holds its visit until its next try, and lets others by', () => {
  const entries = [entry(1, 'far'), entry(2, 'far'), entry(3, 'pool')];
  expect(nextToSend(entries, ({ seq }) => seq === 1)?.seq).toBe(3);
});

test('nothing is sent when all is refused, held or done', () => {
  expect(nextToSend([entry(1, 'a', 'refused'), entry(2, 'a'), entry(3, 'b', 'sent')])).toBeNull();
  expect(nextToSend([])).toBeNull();
});

test('however refusals fall, each group leaves in its order and nothing leaves past a refusal', () => {
  const queues = array(record({ group: constantFrom('a', 'b', 'c'), refused: boolean() }), {
    maxLength: 12,
  });
  assert(
    property(queues, (made) => {
      let queue: ReturnType<typeof entry>[] = made.map(({ group }, i) => entry(i + 1, group));
      const left: number[] = [];
      for (let next = nextToSend(queue); next; next = nextToSend(queue)) {
        const { seq } = next;
        const refused = made[seq - 1]?.refused ?? false;
        if (!refused) left.push(seq);
        queue = queue.map((each) =>
          each.seq === seq ? entry(seq, each.group, refused ? 'refused' : 'sent') : each,
        );
      }
      const firstRefused = (group: string) =>
        1 + made.findIndex((each) => each.group === group && each.refused) || Infinity;
      const wanted = made.flatMap(({ group }, i) => (i + 1 < firstRefused(group) ? [i + 1] : []));
      expect(left).toEqual(wanted);
    }),
  );
});

test('pauses double from two seconds to five minutes', () => {
  expect([1, 2, 3, 4].map(pauseMs)).toEqual([2_000, 4_000, 8_000, 16_000]);
  expect(pauseMs(50)).toBe(300_000);
});

test.each([
  [{ status: 201, json: true, redirected: false }, 'done'],
  [{ status: 204, json: false, redirected: false }, 'done'],
  [{ status: 200, json: false, redirected: false }, 'no-answer'],
  [{ status: 200, json: true, redirected: true }, 'no-answer'],
  [{ status: 400, json: true, redirected: false }, 'refused'],
  [{ status: 403, json: false, redirected: false }, 'no-answer'],
  [{ status: 409, json: true, redirected: false }, 'refused'],
  [{ status: 401, json: true, redirected: false }, 'sign-in'],
  [{ status: 429, json: true, redirected: false }, 'try-later'],
  [{ status: 502, json: false, redirected: false }, 'server-fault'],
] as const)('an answer %o is: %s', (answer, outcome) => {
  expect(outcomeOf(answer)).toBe(outcome);
});
