import { formDifferences } from '@/components/ui/form-differences';
import type { Versioned } from '@/components/ui/use-versioned-form';
import type { VersionRow } from '@/components/ui/version-history';
import { formatMoment } from '@/lib/presentation/moment';
import { policyFormSchema, type PolicyForm, type PolicyView } from '@/lib/schemas/site-policy';

/** The stored policy as the form holds it: the version is counted by the server. */
export function toPolicyForm(view: PolicyView): Versioned<PolicyForm> {
  const { version: _counted, ...form } = view.policy;
  return { version: view.version, form: structuredClone({ ...form, ...view.pathway }) as unknown as PolicyForm };
}

/** Rows of the history from the versions themselves, newest first; version 0 is the standard every site starts from. */
export function policyHistory(versions: readonly PolicyView[]): VersionRow[] {
  return versions.map((view, index) => {
    const before = versions[index + 1];
    return {
      version: view.version,
      when: view.changedAt ? formatMoment(new Date(view.changedAt)) : 'the standard',
      changes: before
        ? formDifferences(policyFormSchema, toPolicyForm(before).form, toPolicyForm(view).form).map(
            ({ words, theirs, mine }) => ({ words, from: theirs, to: mine }),
          )
        : [],
    };
  });
}
