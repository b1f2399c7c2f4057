import Link from 'next/link';
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
      <div className="mt-10 mb-3 flex flex-wrap items-baseline justify-between gap-4">
        <h2 className="text-lg">Versions</h2>
        {versions.length > 1 && (
          <Link href={`${href}/versions`} className="text-link">
            Two versions side by side
          </Link>
        )}
      </div>
      <VersionHistory rows={rows} current={current} hrefOf={(version) => `${href}?version=${version}`} />
    </>
  );
}
