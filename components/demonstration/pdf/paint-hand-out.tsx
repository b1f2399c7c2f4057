import { renderToBuffer } from '@react-pdf/renderer';
import { countPages } from '@/components/plan/pdf/paint-sheet';
import { registerSheetFonts } from '@/components/plan/pdf/sheet-fonts';
import type { HandOut } from '@/lib/domain/demonstration/hand-out';
import type { Paper } from '@/lib/domain/plan/sheet';
import { HandOutPages } from './hand-out-page';

/** Paints all scenes, one a page. */
export async function paintHandOut(printed: HandOut, paper: Paper): Promise<{ readonly bytes: Uint8Array; readonly pages: number }> {
  registerSheetFonts();
  const bytes = new Uint8Array(await renderToBuffer(<HandOutPages printed={printed} paper={paper} />));
  return { bytes, pages: countPages(bytes) };
}
