'use client';

import { useLayoutEffect, useState, type RefObject } from 'react';

export interface BoxSize {
  readonly widthPx: number;
  readonly heightPx: number;
}

/** Whole pixels of an element's content box; null until it is laid out. */
export function useBoxSize(element: RefObject<HTMLElement | null>): BoxSize | null {
  const [size, setSize] = useState<BoxSize | null>(null);
  useLayoutEffect(() => {
    const box = element.current;
    if (!box) return;
    const observer = new ResizeObserver(([entry]) => {
      if (!entry) return;
      const next = { widthPx: Math.floor(entry.contentRect.width), heightPx: Math.floor(entry.contentRect.height) };
      setSize((last) => (last?.widthPx === next.widthPx && last.heightPx === next.heightPx ? last : next));
    });
    observer.observe(box);
    return () => observer.disconnect();
  }, [element]);
  return size;
}
