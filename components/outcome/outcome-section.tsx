import type { ActionResult } from '@/lib/schemas/action-result';
import type { OutcomeForm as Values, OutcomeView } from '@/lib/schemas/outcome';
import type { PlanView } from '@/lib/schemas/plan';
import { Panel } from '@/components/ui/panel';
import { OutcomeForm } from './outcome-form';
import { OutcomeList } from './outcome-list';

/** The outcome of a plan: recorded once it may be used, shown as soon as there is one. */
export function OutcomeSection({ plan, outcomes, record, className }: {
  plan: PlanView;
  outcomes: readonly OutcomeView[];
  /** Absent for who only reads. */
  record?: (id: string, values: Values) => Promise<ActionResult<unknown>>;
  className?: string;
}) {
  const mayUse = plan.state === 'signed off' || plan.state === 'used' || (plan.state === 'for use' && !plan.needsSignOff);
  const form = record && mayUse && !plan.newerVersionExists ? <OutcomeForm plan={plan} record={record} /> : null;
  if (outcomes.length === 0) {
    return form && <Panel id="outcome" title="Outcome" className={className}>{form}</Panel>;
  }
  return (
    <Panel id="outcome" title="Outcome" className={className}>
      <OutcomeList outcomes={outcomes} plan={plan} />
      {form && (
        <details className="mt-4">
          <summary>Correct it</summary>
          <div className="mt-3">{form}</div>
        </details>
      )}
    </Panel>
  );
}
