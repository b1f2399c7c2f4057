'use client';

import { useMemo, useSyncExternalStore } from 'react';
import type { Token } from '../scene/scene';

export type Palette = (token: Token) => string;

/**
 * Canvas cannot resolve CSS custom properties, so their computed values are read, and read again when the theme
 * changes by hand (attribute on the root element) or with the system.
 */
function subscribe(changed: () => void): () => void {
  const observer = new MutationObserver(changed);
  observer.observe(document.documentElement, { attributes: true, attributeFilter: ['data-theme'] });
  const dark = window.matchMedia('(prefers-color-scheme: dark)');
  dark.addEventListener('change', changed);
  return () => {
    observer.disconnect();
    dark.removeEventListener('change', changed);
  };
}

/** Names the theme that is in force without asking for a computed style: this runs at every render of a drag. */
function themeKey(): string {
  const dark = window.matchMedia('(prefers-color-scheme: dark)').matches;
  return `${document.documentElement.dataset.theme ?? 'system'} ${dark ? 'dark' : 'light'}`;
}

export function useTokens(): { readonly palette: Palette; readonly themeKey: string } {
  const key = useSyncExternalStore(subscribe, themeKey, () => '');
  return useMemo(() => ({ themeKey: key, palette: readOnce() }), [key]);
}

/** Each colour is read when it is first painted, and kept for as long as the theme is. */
function readOnce(): Palette {
  const known = new Map<Token, string>();
  return (token) => {
    const kept = known.get(token);
    if (kept !== undefined) return kept;
    const value = getComputedStyle(document.documentElement).getPropertyValue(`--${token}`).trim();
    known.set(token, value);
    return value;
  };
}
