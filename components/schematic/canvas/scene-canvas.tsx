'use client';

import dynamic from 'next/dynamic';

/** Konva needs a window, and is a large script: it comes after the page, into a box that is already there. */
export const SceneCanvas = dynamic(() => import('./konva-scene'), { ssr: false, loading: () => null });
