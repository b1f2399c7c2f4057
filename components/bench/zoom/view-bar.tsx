'use client';

import type { ReactNode } from 'react';
import type { PictureZoom } from './use-zoom';
import { ZoomButtons } from './zoom-buttons';

/** Under every picture: what is shown of it, and how large. */
export function ViewBar({ picture, children }: { picture: PictureZoom; children?: ReactNode }) {
  return (
    <div className="flex flex-wrap items-center justify-end gap-x-4 gap-y-1 px-5 pt-1 pb-2 text-sm">
      {children && <div className="min-w-64 flex-1">{children}</div>}
      <ZoomButtons {...picture} />
    </div>
  );
}
