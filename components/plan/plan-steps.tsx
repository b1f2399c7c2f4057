'use client';

import { useRouter } from 'next/navigation';
import { ActionButton } from '@/components/ui/action-button';
import type { ActionResult } from '@/lib/schemas/action-result';
import type { PlanView } from '@/lib/schemas/plan';

type Target = 'draft' | 'for use' | 'used';

const STEPS: Readonly<Record<PlanView['state'], readonly { to: Target; words: string; primary?: true }[]>> = {
  draft: [{ to: 'for use', words: 'Put for use', primary: true }],
  'for use': [
    { to: 'used', words: 'Mark as used', primary: true },
    { to: 'draft', words: 'Take back to draft' },
  ],
  'signed off': [
    { to: 'used', words: 'Mark as used', primary: true },
    { to: 'draft', words: 'Take back to draft' },
  ],
  used: [],
};

/** The steps of a plan's life that are open from where it stands. */
export function PlanSteps({ plan, move }: { plan: PlanView; move: (to: Target) => Promise<ActionResult<unknown>> }) {
  const router = useRouter();
  const waits = plan.state === 'for use' && plan.needsSignOff;
  return (
    <section aria-label="Next step" className="mt-5 flex flex-wrap items-start gap-3">
      {STEPS[plan.state]
        .filter(({ to }) => !(waits && to === 'used'))
        .map(({ to, words, primary }) => (
          <ActionButton key={to} variant={primary ? 'primary' : 'secondary'} action={() => move(to)} onDone={() => router.refresh()}>
            {words}
          </ActionButton>
        ))}
      {waits && <p className="py-2 text-ink-soft">Waits for a radiologist’s sign-off.</p>}
    </section>
  );
}
