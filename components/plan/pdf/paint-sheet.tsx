import { renderToBuffer } from '@react-pdf/renderer';
import type { PlanView } from '@/lib/schemas/plan';
import { registerSheetFonts } from './sheet-fonts';
import { SheetPage } from './sheet-page';

/** The largest that fits: a long plan is set smaller until it is one page, then its picture gives way; smaller still nobody reads it in a dim room. */
const SETTINGS = [
  { scale: 1.12, pictureScale: 1 },
  { scale: 1, pictureScale: 1 },
  { scale: 0.92, pictureScale: 0.92 },
  { scale: 0.84, pictureScale: 0.84 },
  { scale: 0.76, pictureScale: 0.6 },
  { scale: 0.7, pictureScale: 0.4 },
] as const;

/** Page objects of a PDF stand outside its compressed streams. */
export function countPages(bytes: Uint8Array): number {
  return (Buffer.from(bytes).toString('latin1').match(/\/Type \/Page\b/g) ?? []).length;
}

/** Paints a plan sheet; more than one page only where no allowed size makes it fit. */
export async function paintSheet(
  { plan, link }: { readonly plan: PlanView; readonly link: string },
  paper: 'A4' | 'Letter',
): Promise<{ readonly bytes: Uint8Array; readonly pages: number }> {
  registerSheetFonts();
  let painted = { bytes: new Uint8Array(), pages: 0 };
  for (const setting of SETTINGS) {
    const bytes = new Uint8Array(await renderToBuffer(<SheetPage plan={plan} link={link} paper={paper} {...setting} />));
    painted = { bytes, pages: countPages(bytes) };
    if (painted.pages === 1) break;
  }
  return painted;
}
