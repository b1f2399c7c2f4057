import { formDifferences } from '@/components/ui/form-differences';
import type { VersionRow } from '@/components/ui/version-history';
import { formatMoment } from '@/lib/presentation/moment';
import { scannerFormSchema, type ScannerView } from '@/lib/schemas/scanner';
import { toScannerForm } from './to-scanner-form';

/** Rows of the history from the versions themselves, newest first. */
export function scannerHistory(versions: readonly ScannerView[]): VersionRow[] {
  return versions.map((view, index) => {
    const before = versions[index + 1];
    return {
      version: view.version,
      when: formatMoment(new Date(view.changedAt)),
      changes: before
        ? formDifferences(scannerFormSchema, toScannerForm(before).form, toScannerForm(view).form).map(
            ({ words, theirs, mine }) => ({ words, from: theirs, to: mine }),
          )
        : [],
    };
  });
}
