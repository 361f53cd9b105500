import { useEffect, useState } from 'react';

/** The value once it has stayed the same for so long; the first at once. */
export function useSettled<Value>(value: Value, quietMs: number): Value {
  const [settled, setSettled] = useState(value);
  useEffect(() => {
    const timer = setTimeout(() => setSettled(value), quietMs);
    return () => clearTimeout(timer);
  }, [value, quietMs]);
  return settled;
}
