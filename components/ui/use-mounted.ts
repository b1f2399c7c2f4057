'use client';

import { useSyncExternalStore } from 'react';

const never = () => () => {};

/**
 * False in the server's answer and while hydrating, true afterwards. Some controls put style attributes into the
 * HTML they render on the server, which the content security policy refuses; they are painted once this is true.
 */
export function useMounted(): boolean {
  return useSyncExternalStore(
    never,
    () => true,
    () => false,
  );
}
