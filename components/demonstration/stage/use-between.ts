'use client';

import { useEffect, useState } from 'react';

const MOVE_MS = 450;

/** Slow at both ends. */
const eased = (t: number): number => t * t * (3 - 2 * t);

interface Motion<T> {
  readonly key: string;
  readonly last: T;
  readonly from: T | null;
  readonly t: number;
}

/**
 * A value that moves to its successor when `key` changes, and follows at once while it does not. Nobody who asked for
 * less motion sees any. `value` keeps its identity while nothing in it changed.
 */
export function useBetween<T>(key: string, value: T, mix: (from: T, to: T, t: number) => T): T {
  const [motion, setMotion] = useState<Motion<T>>({ key, last: value, from: null, t: 1 });
  let present = motion;
  if (motion.key !== key) present = { key, last: value, from: motion.last, t: 0 };
  else if (motion.last !== value) present = { ...motion, last: value };
  if (present !== motion) setMotion(present);

  const moving = present.t < 1;
  useEffect(() => {
    if (!moving) return;
    const still = window.matchMedia('(prefers-reduced-motion: reduce)').matches;
    const start = performance.now();
    let frame = requestAnimationFrame(function step(now) {
      const t = still ? 1 : Math.min(1, Math.max(0, (now - start) / MOVE_MS));
      setMotion((each) => (each.key === key ? { ...each, t } : each));
      if (t < 1) frame = requestAnimationFrame(step);
    });
    return () => cancelAnimationFrame(frame);
  }, [key, moving]);

  return moving && present.from !== null ? mix(present.from, value, eased(present.t)) : value;
}
