import { formDifferences } from '@/components/ui/form-differences';
import { VersionHistory } from '@/components/ui/version-history';
import { formatMoment } from '@/lib/presentation/moment';
import { planInput, type PlanView } from '@/lib/schemas/plan';

/** Every version with what it changed, newest first; each can be opened beside the newest. */
export function PlanVersions({ versions, current, href }: { versions: readonly PlanView[]; current: number; href: string }) {
  const rows = versions.map((plan) => {
    const before = versions.find(({ version }) => version === plan.version - 1);
    const parts = ({ patient, keepClear, sequences }: PlanView) => ({ patient, keepClear, sequences });
    const changes = before
      ? formDifferences(planInput, parts(before), parts(plan)).map(({ words, theirs, mine }) => ({ words, from: theirs, to: mine }))
      : [];
    return { version: plan.version, when: `${formatMoment(new Date(plan.savedAt))}, ${plan.savedBy}`, changes };
  });
  return (
    <>
      <h2 className="mt-10 mb-3 text-lg">Versions</h2>
      <VersionHistory rows={rows} current={current} hrefOf={(version) => `${href}?version=${version}`} />
    </>
  );
}
