'use client';

import { useRouter } from 'next/navigation';
import type { ReactNode } from 'react';
import { ActionButton } from '@/components/ui/action-button';
import type { ActionResult } from '@/lib/schemas/action-result';
import type { PlanView } from '@/lib/schemas/plan';
import { signOffWords } from './sign-off-words';

type Target = 'draft' | 'for use' | 'used';

/** The steps of a plan's life that are open from where it stands; each says what will come of it. */
export function PlanSteps({ plan, move }: { plan: PlanView; move: (to: Target) => Promise<ActionResult<unknown>> }) {
  const router = useRouter();
  const why = signOffWords(plan);
  const step = (to: Target, words: string, primary = false) => (
    <ActionButton variant={primary ? 'primary' : 'secondary'} action={() => move(to)} onDone={() => router.refresh()}>
      {words}
    </ActionButton>
  );
  if (plan.state === 'used') return null;
  const waits = plan.state === 'for use' && why !== undefined;
  return (
    <section aria-labelledby="next-step" className="mt-6 border-y border-line bg-paper px-4 py-4">
      <h2 id="next-step" className="mb-3 text-lg">
        {waits ? 'Waits for a radiologist’s sign-off' : 'Next step'}
      </h2>
      {plan.state === 'draft' ? (
        <Step button={step('for use', why ? `Put version ${plan.version} for use and ask for sign-off` : `Put version ${plan.version} for use`, true)}>
          {why
            ? `A radiologist has to sign it off, because ${why}. Radiologists of the site are told by mail.`
            : 'It can be scanned from at once. Those who scan are told by mail.'}
        </Step>
      ) : (
        <>
          {waits && <p className="mb-3 max-w-prose">It is not scanned from until then, because {why}. Radiologists have been told by mail.</p>}
          <Step button={step('draft', 'Take back to draft')}>It stops being for use. Its versions and decisions stay in the record.</Step>
          {!waits && <Step button={step('used', 'Mark as used without an outcome')}>It stays as it is from then on. Recording the outcome does the same, and says what came of it.</Step>}
        </>
      )}
    </section>
  );
}

function Step({ button, children }: { button: ReactNode; children: ReactNode }) {
  return (
    <div className="flex flex-wrap items-center gap-x-4 gap-y-2 not-first:mt-3">
      {button}
      <p className="max-w-prose min-w-64 flex-1 text-sm text-ink-soft">{children}</p>
    </div>
  );
}
