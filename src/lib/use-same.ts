import { useRef } from 'react';

/** The value before as long as the new one says the same: what hangs on it is not made anew. Plain data only. */
export function useSame<T>(value: T): T {
  const held = useRef(value);
  if (held.current !== value && JSON.stringify(held.current) !== JSON.stringify(value)) held.current = value;
  return held.current;
}
