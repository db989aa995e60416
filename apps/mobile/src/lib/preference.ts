import { useSyncExternalStore } from 'react';
import type { z } from 'zod';
import { storage } from '@/lib/storage';

export type Preference<T> = {
  get: () => T;
  set: (value: T) => void;
  use: () => T;
};

type Terms<T> = { key: string; schema: z.ZodType<T>; fallback: T };

/** One choice of the reader's, kept on this device and shared by every screen that reads it. */
export function createPreference<T>({ key, schema, fallback }: Terms<T>): Preference<T> {
  const readers = new Set<() => void>();
  const read = (text: string | null): T | undefined => {
    if (text === null) return undefined;
    try {
      return schema.safeParse(JSON.parse(text)).data;
    } catch {
      return undefined; // an older or foreign value: fall back rather than fail
    }
  };
  let value = read(storage.peek(key)) ?? fallback;
  let touched = false;
  const become = (next: T): void => {
    value = next;
    readers.forEach((tell) => tell());
  };
  void storage.get(key).then((text) => {
    const stored = read(text);
    if (stored !== undefined && !touched) become(stored);
  });
  const subscribe = (reader: () => void): (() => void) => {
    readers.add(reader);
    return () => readers.delete(reader);
  };
  const get = (): T => value;
  return {
    get,
    set: (next) => {
      touched = true;
      become(next);
      void storage.set(key, JSON.stringify(next));
    },
    use: () => useSyncExternalStore(subscribe, get, get),
  };
}
