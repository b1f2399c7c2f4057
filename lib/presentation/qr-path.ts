import qrcode from 'qrcode-generator';
import type { QrPath } from './qr-quiet-zone';

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
