'use client';

import { useLayoutEffect, useRef } from 'react';

/** Puts an element at a pixel of its parent through the CSSOM: the page's policy refuses style attributes. */
export function usePlaced<E extends HTMLElement>(x: number, y: number) {
  const element = useRef<E>(null);
  useLayoutEffect(() => {
    element.current?.style.setProperty('left', `${x}px`);
    element.current?.style.setProperty('top', `${y}px`);
  }, [x, y]);
  return element;
}
