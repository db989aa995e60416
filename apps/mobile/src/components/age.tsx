import { useEffect, useState } from 'react';
import { Text } from '@/components/text';
import { ago } from '@/lib/format-time';

/** Below this nobody needs to be told, ms. */
const FRESH_MS = 60_000;

type Props = {
  readAtMs: number;
  /** It is being read afresh now. */
  reading: boolean;
  /** The last try to read it afresh failed. */
  failed: boolean;
};

/** How old what is shown is: "Read 3 hours ago; no answer now." Says nothing about what is fresh. */
export function Age({ readAtMs, reading, failed }: Props) {
  const [nowMs, setNowMs] = useState(() => Date.now());
  useEffect(() => {
    const timer = setInterval(() => setNowMs(Date.now()), 30_000);
    return () => clearInterval(timer);
  }, []);
  if (!failed && nowMs - readAtMs < FRESH_MS) return null;
  const state = reading ? ' Reading it afresh…' : failed ? ' No answer from the server now.' : '';
  return (
    <Text role="status" size="small" tone={failed ? 'amber' : 'inkSoft'}>
      {`Read ${ago(readAtMs, nowMs)}.${state}`}
    </Text>
  );
}
