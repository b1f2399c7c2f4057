import Link from 'next/link';
import { Notice } from '@/components/ui/notice';
import type { PlanView } from '@/lib/schemas/plan';

/** Says so when the version on the screen, or on the paper in the hand, is not the newest. */
export function NewerVersion({ plan, href }: { plan: PlanView; href: string }) {
  if (!plan.newerVersionExists) return null;
  return (
    <Notice tone="error" title={`This is version ${plan.version}. The newest is version ${plan.currentVersion}.`} className="mb-4 print:hidden">
      Do not scan from this one.{' '}
      <Link href={href} className="underline">
        Open version {plan.currentVersion}
      </Link>
    </Notice>
  );
}
