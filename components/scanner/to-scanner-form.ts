import type { Versioned } from '@/components/ui/use-versioned-form';
import type { ScannerForm, ScannerView } from '@/lib/schemas/scanner';

/** The stored scanner as the form holds it. */
export function toScannerForm(view: ScannerView): Versioned<ScannerForm> {
  const { scanner, limitsOwner, limitsCheckedOn, note, version } = view;
  return { version, form: structuredClone({ scanner, limitsOwner, limitsCheckedOn, note }) as ScannerForm };
}
