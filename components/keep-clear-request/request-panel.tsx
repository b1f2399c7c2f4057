import { Panel } from '@/components/ui/panel';
import type { BodyRegion } from '@/lib/physics/model/patient';
import type { ActionResult } from '@/lib/schemas/action-result';
import type { KeepClearRequestForm as Values, KeepClearRequestView } from '@/lib/schemas/keep-clear-request';
import { KeepClearRequestForm } from './request-form';
import { RequestedArea } from './requested-area';

/** On a booking: what was asked for, and for those who may, the form to ask. */
export function KeepClearRequestPanel({ region, requested, ask }: {
  region: BodyRegion;
  requested: KeepClearRequestView | null;
  /** Absent for who only reads. */
  ask?: (form: Values) => Promise<ActionResult<unknown>>;
}) {
  if (!requested && !ask) return null;
  return (
    <Panel title="Keep-clear area asked for">
      {requested ? (
        <RequestedArea requested={requested} />
      ) : (
        <p className="text-ink-soft">Nobody has asked for one; the protocol’s area holds.</p>
      )}
      {ask && (
        <details className="mt-4">
          <summary>{requested ? 'Ask for another' : 'Ask for an area'}</summary>
          <div className="mt-4">
            <KeepClearRequestForm key={requested?.at ?? 'first'} region={region} requested={requested} ask={ask} />
          </div>
        </details>
      )}
    </Panel>
  );
}
