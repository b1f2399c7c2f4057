'use client';

import { useSyncExternalStore } from 'react';
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

/** Names the theme that is in force; only a change of it needs new colours. */
function themeKey(): string {
  const style = getComputedStyle(document.documentElement);
  return `${style.getPropertyValue('--cloth')} ${style.getPropertyValue('--ink')}`;
}

export function useTokens(): { readonly palette: Palette; readonly themeKey: string } {
  const key = useSyncExternalStore(subscribe, themeKey, () => '');
  const style = getComputedStyle(document.documentElement);
  return { themeKey: key, palette: (token) => style.getPropertyValue(`--${token}`).trim() };
}
