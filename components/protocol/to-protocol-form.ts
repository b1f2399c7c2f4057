import { formDifferences } from '@/components/ui/form-differences';
import type { Versioned } from '@/components/ui/use-versioned-form';
import type { VersionRow } from '@/components/ui/version-history';
import { formatMoment } from '@/lib/presentation/moment';
import { protocolFormSchema, type ProtocolForm, type ProtocolView } from '@/lib/schemas/protocol';

/** The stored protocol as the form holds it. */
export function toProtocolForm(view: ProtocolView): Versioned<ProtocolForm> {
  const { name, region, keepClearPreset, keepClear, version } = view;
  const sequences = view.sequences.map(({ prescription }) => prescription);
  return {
    version,
    form: structuredClone({ name, region, keepClearPreset, keepClear, sequences }) as unknown as ProtocolForm,
  };
}

/** Rows of the history from the versions themselves, newest first. */
export function protocolHistory(versions: readonly ProtocolView[]): VersionRow[] {
  return versions.map((view, index) => {
    const before = versions[index + 1];
    return {
      version: view.version,
      when: formatMoment(new Date(view.changedAt)),
      changes: before
        ? formDifferences(protocolFormSchema, toProtocolForm(before).form, toProtocolForm(view).form).map(
            ({ words, theirs, mine }) => ({ words, from: theirs, to: mine }),
          )
        : [],
    };
  });
}
