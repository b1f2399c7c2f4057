/** Attributes in which a painted scene names a colour token. */
const PAINTED = ['fill', 'stroke'] as const;
const SVG = 'http://www.w3.org/2000/svg';

/** The faces a page's letters are set in, each as one rule that fetches nothing. */
async function embeddedFonts(family: string): Promise<string> {
  const wanted = family.split(',').map((name) => name.trim().replace(/^["']|["']$/g, ''));
  const rules = [...document.styleSheets].flatMap((sheet) => [...sheet.cssRules].filter((rule) => rule instanceof CSSFontFaceRule).map((rule) => ({ rule, base: sheet.href ?? document.baseURI })));
  const used = rules.filter(({ rule }) => wanted[0] === rule.style.getPropertyValue('font-family').replace(/^["']|["']$/g, ''));
  const texts = await Promise.all(
    used.map(async ({ rule, base }) => {
      const address = /url\("?([^")]+)"?\)/.exec(rule.style.getPropertyValue('src'))?.[1];
      if (!address) return '';
      const bytes = new Uint8Array(await (await fetch(new URL(address, base))).arrayBuffer());
      let text = '';
      for (let i = 0; i < bytes.length; i += 0x8000) text += String.fromCharCode(...bytes.subarray(i, i + 0x8000));
      return `@font-face{font-family:"Scene";font-weight:200 800;src:url(data:font/woff2;base64,${btoa(text)}) format("woff2")}`;
    }),
  );
  return texts.join('');
}

/** The same drawing with its colours written out: outside the page there are no tokens. */
function paintedCopy(drawing: SVGSVGElement): SVGSVGElement {
  const copy = drawing.cloneNode(true) as SVGSVGElement;
  const originals = [drawing, ...drawing.querySelectorAll('*')];
  for (const [i, element] of [copy, ...copy.querySelectorAll('*')].entries()) {
    const computed = getComputedStyle(originals[i]!);
    for (const name of PAINTED) if (element.getAttribute(name)?.startsWith('var(')) element.setAttribute(name, computed.getPropertyValue(name));
    element.removeAttribute('data-node');
    element.removeAttribute('class');
  }
  return copy;
}

export interface StandaloneSvg {
  readonly text: string;
  readonly widthPx: number;
  readonly heightPx: number;
}

/**
 * What a scene's picture shows now, as one SVG file that needs neither this page nor the network: its drawings over one
 * another, colours of the theme written out, letters with their face, the ground below.
 */
export async function standaloneSvg(picture: Element, title: string): Promise<StandaloneSvg> {
  const drawings = [...picture.querySelectorAll('svg')];
  const { width: widthPx, height: heightPx } = drawings.at(-1)!.viewBox.baseVal;
  const style = getComputedStyle(picture);
  const root = document.createElementNS(SVG, 'svg');
  root.setAttribute('xmlns', SVG);
  root.setAttribute('viewBox', `0 0 ${widthPx} ${heightPx}`);
  root.setAttribute('width', String(widthPx));
  root.setAttribute('height', String(heightPx));
  root.setAttribute('font-family', 'Scene, sans-serif');
  const name = document.createElementNS(SVG, 'title');
  name.textContent = title;
  const face = document.createElementNS(SVG, 'style');
  face.textContent = await embeddedFonts(style.fontFamily);
  const ground = document.createElementNS(SVG, 'rect');
  ground.setAttribute('width', '100%');
  ground.setAttribute('height', '100%');
  ground.setAttribute('fill', getComputedStyle(document.body).getPropertyValue('--cloth').trim());
  root.append(name, face, ground);
  for (const drawing of drawings) root.append(...paintedCopy(drawing).childNodes);
  return { text: new XMLSerializer().serializeToString(root), widthPx, heightPx };
}

/** Pixels of the long side of a saved picture: a slide of full width. */
const WIDTH_PX = 1920;

export async function pngOf({ text, widthPx, heightPx }: StandaloneSvg): Promise<Blob> {
  const image = new Image();
  // The page's policy allows pictures from data: addresses and from nowhere else.
  image.src = `data:image/svg+xml;charset=utf-8,${encodeURIComponent(text)}`;
  await image.decode();
  const canvas = document.createElement('canvas');
  canvas.width = WIDTH_PX;
  canvas.height = Math.round((WIDTH_PX * heightPx) / widthPx);
  canvas.getContext('2d')!.drawImage(image, 0, 0, canvas.width, canvas.height);
  return new Promise((resolve, reject) => canvas.toBlob((blob) => (blob ? resolve(blob) : reject(new Error('The browser made no picture.'))), 'image/png'));
}
