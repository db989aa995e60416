import { afterEach, beforeEach, expect, test, vi } from 'vitest';

class FakeSource extends EventTarget {
  static readonly OPEN = 1;
  static made: FakeSource[] = [];
  readyState = 1;
  constructor(readonly url: string) {
    super();
    FakeSource.made.push(this);
  }
  close(): void {
    this.readyState = 2;
  }
  say(event: string, data = '{}'): void {
    this.dispatchEvent(Object.assign(new Event(event), { data }));
  }
}

const returns = new Set<() => void>();
vi.mock('@/lib/on-return', () => ({
  onReturn: (act: () => void) => {
    returns.add(act);
    return () => returns.delete(act);
  },
}));

beforeEach(() => {
  vi.useFakeTimers();
  vi.stubGlobal('EventSource', FakeSource);
  FakeSource.made = [];
});
afterEach(() => {
  vi.useRealTimers();
  vi.unstubAllGlobals();
});

async function watching() {
  const { watchStream } = await import('./event-stream.web');
  const heard: string[] = [];
  let missed = 0;
  const stop = watchStream('/events', {
    event: 'board',
    heard: (data) => heard.push(data),
    missed: () => (missed += 1),
  });
  return { heard, missed: () => missed, stop };
}
const source = () => FakeSource.made.at(-1)!;

test('what comes is passed on, and while it comes nothing is asked for', async () => {
  const watch = await watching();
  source().say('board', 'far');
  for (let beats = 0; beats < 10; beats += 1) {
    vi.advanceTimersByTime(20_000);
    source().say('beat');
  }
  expect(watch.heard).toEqual(['far']);
  expect(watch.missed()).toBe(0);
  expect(FakeSource.made).toHaveLength(1);
  watch.stop();
});

test('a stream the browser gave up is opened anew, and asked for meanwhile every half minute', async () => {
  const watch = await watching();
  source().close();
  vi.advanceTimersByTime(30_000);
  expect(watch.missed()).toBe(1);
  expect(FakeSource.made).toHaveLength(2);
  source().close();
  vi.advanceTimersByTime(30_000);
  expect(watch.missed()).toBe(2);
  watch.stop();
});

test('one that fell silent while the phone slept is found out on coming back', async () => {
  const watch = await watching();
  vi.setSystemTime(Date.now() + 3_600_000); // asleep: no timer ran
  for (const comeBack of returns) comeBack();
  expect(watch.missed()).toBe(1);
  expect(FakeSource.made).toHaveLength(2);
  for (const comeBack of returns) comeBack();
  expect(watch.missed()).toBe(1);
  watch.stop();
});

test('stopped, it neither listens nor asks', async () => {
  const watch = await watching();
  watch.stop();
  vi.advanceTimersByTime(300_000);
  expect(watch.missed()).toBe(0);
  expect(source().readyState).toBe(2);
  expect(returns.size).toBe(0);
});
