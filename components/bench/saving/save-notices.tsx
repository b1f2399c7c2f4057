'use client';

import { formDifferences } from '@/components/ui/form-differences';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { Table, Td, Th, Tr } from '@/components/ui/table';
import { planInput } from '@/lib/schemas/plan';
import { formatTime } from '@/lib/presentation/moment';
import { VERDICT_WORDS } from '@/lib/presentation/verdict-words';
import type { Verdict } from '@/lib/physics/model/assessment';
import { useBench } from '../bench-context';
import type { NewestVersion } from './use-newest-version';
import type { PlanSaving } from './use-plan-saving';

/** What came of saving, when it is not simply saved. Nothing on the bench is lost in any of it. */
export function SaveNotices({ plan }: { plan: PlanSaving }) {
  const { saving, differences, restored } = plan;
  if (saving.kind === 'overtaken') return <Overtaken plan={plan} theirs={saving.theirs} />;
  if (saving.kind === 'refused') {
    const fields = Object.entries(saving.problem.fields ?? {});
    return (
      <Notice tone="error" live title={`Not saved. ${saving.problem.title}`} className="m-3">
        {fields.length > 0 && (
          <ul>
            {fields.map(([path, message]) => (
              <li key={path}>{path ? `${path}: ${message}` : message}</li>
            ))}
          </ul>
        )}
        {saving.problem.incidentId && <p>Incident {saving.problem.incidentId}</p>}
      </Notice>
    );
  }
  if (plan.news && saving.kind === 'idle') return <News plan={plan} news={plan.news} />;
  if (differences.length > 0) {
    return (
      <Notice live title="The server worked it out with newer data, and stored its own answer." className="m-3">
        <ul>
          {differences.map(({ sequence, field, bench, server }) => (
            <li key={`${sequence}/${field}`}>
              {sequence || 'All sequences'}, {field === 'scanS' ? 'scan time' : field}: here {shown(bench)}, server {shown(server)}
            </li>
          ))}
        </ul>
      </Notice>
    );
  }
  if (restored) {
    return (
      <Notice live className="m-3">
        Unsaved changes from earlier in this tab are back on the bench. Undo takes them off.
      </Notice>
    );
  }
  return null;
}

/** Told while both still work, in one line: what is on the bench stays until its owner decides. */
function News({ plan, news }: { plan: PlanSaving; news: NewestVersion }) {
  return (
    <Notice
      live
      title={`${news.savedBy} saved version ${news.version} of this plan at ${clockOf(news.savedAt)}, ${whileOn(plan.identity.version)}.`}
      className="m-3"
    >
      What is on your bench is kept.{' '}
      <Button size="sm" onClick={plan.showNews} className="ml-2">
        Show what differs
      </Button>
    </Notice>
  );
}

const clockOf = (moment: string): string => formatTime(new Date(moment));

const whileOn = (version: number): string =>
  version === 0 ? 'while you were working on one that is not saved yet' : `while you were working on version ${version}`;

function Overtaken({ plan, theirs }: { plan: PlanSaving; theirs: Extract<PlanSaving['saving'], { kind: 'overtaken' }>['theirs'] }) {
  const { store } = useBench();
  const { patient, keepClear, sequences } = store.read().document;
  const mine = { patient, keepClear, sequences };
  const stored = { patient: theirs.patient, keepClear: theirs.keepClear, sequences: theirs.sequences };
  const changed = formDifferences(planInput, stored, mine);
  return (
    <div className="m-3">
      <Notice
        tone="error"
        live
        title={`${theirs.savedBy} saved version ${theirs.version} ${whileOn(plan.identity.version)}.`}
      >
        Nothing was overwritten and nothing of yours is lost. Every version stays in the history.
      </Notice>
      {changed.length > 0 && (
        <div className="mt-3 max-h-64 overflow-y-auto">
          <Table caption="Values that differ">
            <thead>
              <tr>
                <Th>Value</Th>
                <Th>Version {theirs.version}</Th>
                <Th>Yours</Th>
              </tr>
            </thead>
            <tbody>
              {changed.map((each) => (
                <Tr key={each.path}>
                  <Td>{each.words}</Td>
                  <Td className="figures">{each.theirs}</Td>
                  <Td className="figures font-semibold">{each.mine}</Td>
                </Tr>
              ))}
            </tbody>
          </Table>
        </div>
      )}
      <div className="mt-3 flex flex-wrap gap-3">
        <Button variant="primary" onClick={() => plan.save(theirs.version)}>
          Save yours as version {theirs.version + 1}
        </Button>
        <Button onClick={plan.takeTheirs}>Continue from version {theirs.version}</Button>
      </div>
    </div>
  );
}

function shown(value: string): string {
  return VERDICT_WORDS[value as Verdict] ?? value;
}
