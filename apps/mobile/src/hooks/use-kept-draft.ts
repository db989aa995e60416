import { useEffect, useRef, useState } from 'react';
import type { DefaultValues, FieldValues, UseFormReturn } from 'react-hook-form';
import { draftKey, readDraft, writeDraft } from '@/lib/draft-text';
import { onLeaving } from '@/lib/on-leaving';
import { sessionStore } from '@/lib/session-store';
import { storage } from '@/lib/storage';

const PAUSE_MS = 250; // typing pauses at least this often; a write per letter would stutter on an old phone

type Terms<V extends FieldValues> = { form: string; start: DefaultValues<V>; leaveOut: readonly string[] };

type KeptDraft<V extends FieldValues> = {
  firstValues: DefaultValues<V>;
  restored: boolean;
  /** Keeps the form's values as they change. Called once, in the form's own hook. */
  useKeeping: (form: Pick<UseFormReturn<V>, 'subscribe' | 'getValues' | 'reset'>) => void;
  /** The form stands at these values now, sent or begun afresh: nothing of it is left to keep. */
  settle: (values: DefaultValues<V>) => void;
};

/** One form's draft on this device: where its values come from at first, and where they go while typed. */
export function useKeptDraft<V extends FieldValues>({ form: name, start, leaveOut }: Terms<V>): KeptDraft<V> {
  const [key] = useState(() => draftKey(sessionStore.get().account?.id ?? null, name));
  const [found, setFound] = useState(() => readDraft(storage.peek(key), start));
  const begun = useRef(start); // what counts as "nothing typed yet"
  const [firstValues] = useState<DefaultValues<V>>(() => ({ ...start, ...found }));

  const settle = (values: DefaultValues<V>): void => {
    begun.current = values;
    setFound(null);
    void storage.remove(key);
  };

  const useKeeping: KeptDraft<V>['useKeeping'] = (form) => {
    const { subscribe, getValues, reset } = form;
    const left = useRef(leaveOut);
    useEffect(() => {
      let timer: ReturnType<typeof setTimeout> | undefined;
      let changed = false;
      const keep = (): void => {
        clearTimeout(timer);
        if (!changed) return;
        changed = false;
        const text = writeDraft(getValues(), begun.current, left.current);
        void (text === null ? storage.remove(key) : storage.set(key, text));
      };
      const stopWatching = subscribe({
        formState: { values: true },
        callback: () => {
          changed = true;
          clearTimeout(timer);
          timer = setTimeout(keep, PAUSE_MS);
        },
      });
      const stopLeaving = onLeaving(keep);
      return () => {
        keep();
        stopWatching();
        stopLeaving();
      };
    }, [subscribe, getValues]);
    useEffect(() => {
      if (storage.peek(key) !== null) return; // already there from the first moment
      void storage.get(key).then((text) => {
        const late = readDraft(text, begun.current);
        if (late === null) return;
        setFound(late);
        reset({ ...begun.current, ...late });
      });
    }, [reset]);
  };

  return {
    firstValues,
    restored: found !== null,
    useKeeping,
    settle,
  };
}
