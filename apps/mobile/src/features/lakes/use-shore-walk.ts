import { useEffect, useState } from 'react';
import { NEW_WALK, ShoreWalk, withFix, withPause } from '@mereward/shared/lakes/shore-walk';
import { z } from 'zod';
import { draftKey } from '@/lib/draft-text';
import { keepAwake } from '@/lib/keep-awake';
import { sessionStore } from '@/lib/session-store';
import { storage } from '@/lib/storage';
import { watchPosition } from '@/lib/watch-position';
import type { DevicePosition, PositionTrouble } from '@/lib/watched-position';

/** What is walked round. */
export type WalkOf = 'shore' | 'island';

const KeptWalk = z.object({ of: z.enum(['shore', 'island']), walk: ShoreWalk });
type KeptWalk = z.infer<typeof KeptWalk>;

function readKept(text: string | null): KeptWalk | null {
  if (text === null) return null;
  try {
    return KeptWalk.safeParse(JSON.parse(text)).data ?? null;
  } catch {
    return null;
  }
}

export type ShoreWalking = {
  /** The walk under way, or null. */
  walk: ShoreWalk | null;
  of: WalkOf;
  listening: boolean;
  /** It was begun before this page was opened. */
  restored: boolean;
  /** The newest fix, whether it counted or not. */
  newest: DevicePosition | null;
  trouble: PositionTrouble | null;
  start: (of: WalkOf) => void;
  pause: () => void;
  goOn: () => void;
  /** Forgets it. */
  end: () => void;
};

/**
 * A walk round a shore with this phone. It is kept on the device fix by fix, so that a reload, a call or a screen
 * gone dark loses none of it; `keptAs` names what it is a walk of.
 */
export function useShoreWalk(keptAs: string): ShoreWalking {
  const [key] = useState(() => draftKey(sessionStore.get().account?.id ?? null, `shore-walk:${keptAs}`));
  const [kept, setKept] = useState(() => readKept(storage.peek(key)));
  const [restored, setRestored] = useState(kept !== null);
  const [listening, setListening] = useState(false);
  const [newest, setNewest] = useState<DevicePosition | null>(null);
  const [trouble, setTrouble] = useState<PositionTrouble | null>(null);

  const change = (next: (walk: ShoreWalk) => ShoreWalk): void =>
    setKept((now) => now && { ...now, walk: next(now.walk) });

  useEffect(() => {
    void (kept ? storage.set(key, JSON.stringify(kept)) : storage.remove(key));
  }, [key, kept]);

  useEffect(() => {
    if (!listening) return undefined;
    const stopWatching = watchPosition({
      onPosition: (position) => {
        setTrouble(null);
        setNewest(position);
        setKept((now) => now && { ...now, walk: withFix(now.walk, position) });
      },
      onTrouble: (why) => {
        setTrouble(why);
        if (why !== 'no-signal') setListening(false);
      },
    });
    const letSleep = keepAwake();
    return () => {
      stopWatching();
      letSleep();
    };
  }, [listening]);

  const listen = (): void => {
    setTrouble(null);
    setListening(true);
  };
  return {
    walk: kept?.walk ?? null,
    of: kept?.of ?? 'shore',
    listening,
    restored,
    newest,
    trouble,
    start: (of) => {
      setKept({ of, walk: NEW_WALK });
      setRestored(false);
      setNewest(null);
      listen();
    },
    pause: () => {
      setListening(false);
      change(withPause);
    },
    goOn: () => {
      change(withPause); // whatever was walked meanwhile was not seen
      setRestored(false);
      listen();
    },
    end: () => {
      setListening(false);
      setTrouble(null);
      setKept(null);
    },
  };
}
