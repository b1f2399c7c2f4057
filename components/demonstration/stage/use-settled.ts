'use client';

import { useEffect, useRef, useState } from 'react';

const QUIET_MS = 90;
const LONGEST_MS = 400;

/**
 * A value that follows when it has been left alone for a moment, or has been moved for long enough: what it leads to is
 * worth seeing and too much for every frame of a control that is being moved.
 */
export function useSettled<T>(value: T): T {
  const [settled, setSettled] = useState(value);
  const since = useRef<number | null>(null);
  useEffect(() => {
    if (Object.is(value, settled)) {
      since.current = null;
      return;
    }
    since.current ??= performance.now();
    const left = Math.max(0, Math.min(QUIET_MS, since.current + LONGEST_MS - performance.now()));
    const timer = setTimeout(() => setSettled(value), left);
    return () => clearTimeout(timer);
  }, [value, settled]);
  return settled;
}
