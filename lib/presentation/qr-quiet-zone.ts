export interface QrPath {
  /** Modules a side, without the quiet zone. */
  readonly modules: number;
  /** Dark runs as one SVG path; one unit is one module. */
  readonly path: string;
}

/** Light modules that a reader needs round the code (ISO/IEC 18004; from memory). */
export const QR_QUIET_MODULES = 4;
