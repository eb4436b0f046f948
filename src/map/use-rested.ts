import { useEffect, useState } from 'react';

/** A value once it has stayed the same for a while: for what is dear to draw and may come after the slider. The first at once. */
export function useRested<Value>(value: Value, restMs: number): Value {
  const [rested, setRested] = useState(value);
  useEffect(() => {
    const timer = setTimeout(() => setRested(value), restMs);
    return () => clearTimeout(timer);
  }, [value, restMs]);
  return rested;
}
