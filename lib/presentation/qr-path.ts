import qrcode from 'qrcode-generator';

export interface QrPath {
  /** Modules a side, without the quiet zone. */
  readonly modules: number;
  /** Dark runs as one SVG path; one unit is one module. */
  readonly path: string;
}

/** Light modules that a reader needs round the code (ISO/IEC 18004; from memory). */
export const QR_QUIET_MODULES = 4;

/** A short address as a code to scan: about 15 % of it may be smudged (level M). */
export function qrPath(text: string): QrPath {
  const code = qrcode(0, 'M');
  code.addData(text);
  code.make();
  const modules = code.getModuleCount();
  let path = '';
  for (let row = 0; row < modules; row += 1) {
    for (let from = 0; from < modules; from += 1) {
      if (!code.isDark(row, from)) continue;
      let to = from;
      while (to < modules && code.isDark(row, to)) to += 1;
      path += `M${from} ${row}h${to - from}v1h${from - to}z`;
      from = to;
    }
  }
  return { modules, path };
}
