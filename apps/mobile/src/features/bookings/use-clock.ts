import { useEffect, useState } from 'react';

/** Now, in ms, moving on every so often while the screen is looked at. */
export function useClock(everyMs: number): number {
  const [nowMs, setNowMs] = useState(() => Date.now());
  useEffect(() => {
    const timer = setInterval(() => setNowMs(Date.now()), everyMs);
    return () => clearInterval(timer);
  }, [everyMs]);
  return nowMs;
}
