import { useEffect, useRef, type RefObject } from 'react';
import type { Text } from 'react-native';

let arrivedAt: string | null = null; // the first page of a visit keeps the browser's own start

/** Puts the focus on a page's heading when the reader has come from another page, so reading starts there. */
export function useArrivalFocus(where: string): RefObject<Text | null> {
  const heading = useRef<Text>(null);
  useEffect(() => {
    if (arrivedAt !== null && arrivedAt !== where) heading.current?.focus();
    arrivedAt = where;
  }, [where]);
  return heading;
}
