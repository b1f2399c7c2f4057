'use client';

import { QR_QUIET_MODULES, type QrPath } from '@/lib/presentation/qr-quiet-zone';

/** The short link as a code for a phone or tablet. Black on white in either theme: inverted codes are not read everywhere. */
export function ScanCode({ code: { modules, path }, className }: { code: QrPath; className?: string }) {
  const side = modules + 2 * QR_QUIET_MODULES;
  return (
    <svg
      viewBox={`${-QR_QUIET_MODULES} ${-QR_QUIET_MODULES} ${side} ${side}`}
      role="img"
      aria-label="Code to scan: opens this plan and says whether a newer version exists"
      shapeRendering="crispEdges"
      className={className}
    >
      <rect x={-QR_QUIET_MODULES} y={-QR_QUIET_MODULES} width={side} height={side} fill="white" />
      <path d={path} fill="black" />
    </svg>
  );
}
