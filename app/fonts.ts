import localFont from 'next/font/local';

// The Latin files come first and are preloaded; a name with Polish or Czech letters pulls the extended file when
// (and only when) one of its glyphs is asked for. Next's metric fallback must follow the extended file, or it would
// answer for those letters before the file is tried; hence adjustFontFallback only on the last of each pair.
const text = localFont({
  src: '../node_modules/@fontsource-variable/atkinson-hyperlegible-next/files/atkinson-hyperlegible-next-latin-wght-normal.woff2',
  weight: '200 800',
  style: 'normal',
  variable: '--font-text',
  display: 'swap',
  adjustFontFallback: false,
});

const textExtended = localFont({
  src: '../node_modules/@fontsource-variable/atkinson-hyperlegible-next/files/atkinson-hyperlegible-next-latin-ext-wght-normal.woff2',
  weight: '200 800',
  style: 'normal',
  variable: '--font-text-ext',
  display: 'swap',
  preload: false,
  adjustFontFallback: 'Arial',
});

const figures = localFont({
  src: '../node_modules/@fontsource-variable/atkinson-hyperlegible-mono/files/atkinson-hyperlegible-mono-latin-wght-normal.woff2',
  weight: '200 800',
  style: 'normal',
  variable: '--font-figures',
  display: 'swap',
  adjustFontFallback: false,
});

const figuresExtended = localFont({
  src: '../node_modules/@fontsource-variable/atkinson-hyperlegible-mono/files/atkinson-hyperlegible-mono-latin-ext-wght-normal.woff2',
  weight: '200 800',
  style: 'normal',
  variable: '--font-figures-ext',
  display: 'swap',
  preload: false,
  adjustFontFallback: false,
});

export const fontVariables = [text, textExtended, figures, figuresExtended]
  .map((font) => font.variable)
  .join(' ');
