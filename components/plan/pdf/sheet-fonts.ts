import { createRequire } from 'node:module';
import { Font } from '@react-pdf/renderer';

/** The faces of the screen in single weights: a PDF takes no variable font. They are shipped with the app. */
export const TEXT_FONT = 'Sheet text';
export const FIGURE_FONT = 'Sheet figures';

const require = createRequire(import.meta.url);
const file = (family: string, weight: number) => require.resolve(`@fontsource/${family}/files/${family}-latin-${weight}-normal.woff`);

let registered = false;

export function registerSheetFonts(): void {
  if (registered) return;
  registered = true;
  for (const [family, name] of [[TEXT_FONT, 'atkinson-hyperlegible-next'], [FIGURE_FONT, 'atkinson-hyperlegible-mono']] as const) {
    Font.register({ family, fonts: [400, 700].map((fontWeight) => ({ src: file(name, fontWeight), fontWeight })) });
  }
  // Whole words only: a broken number or reference is read wrongly.
  Font.registerHyphenationCallback((word) => [word]);
}

/** Signs the shipped faces lack, in words. */
export function printable(text: string): string {
  return text.replace(/→/g, 'to').replace(/←/g, 'from').replace(/≤/g, 'at most').replace(/≥/g, 'at least').replace(/[≈]/g, 'about');
}
