import { useEffect, useState } from 'react';

const SETTLED_MS = 200;

/** A value as it was once it had stood still for a moment: an azimuth that is being turned asks once, at its end. */
export function useSettled<Value>(value: Value): Value {
  const key = JSON.stringify(value);
  const [settled, setSettled] = useState({ key, value });
  useEffect(() => {
    if (settled.key === key) return;
    const timer = setTimeout(() => setSettled({ key, value }), SETTLED_MS);
    return () => clearTimeout(timer);
  }, [settled.key, key, value]);
  return settled.value;
}
