import { useEffect, useState } from 'react';

/** A value once it has stood still for a while: what is asked of the server as somebody types. */
export function useSettled<T>(value: T, pauseMs = 350): T {
  const [settled, setSettled] = useState(value);
  useEffect(() => {
    const timer = setTimeout(() => setSettled(() => value), pauseMs);
    return () => clearTimeout(timer);
  }, [value, pauseMs]);
  return settled;
}
