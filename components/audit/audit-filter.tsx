import { Button, LinkButton } from '@/components/ui/button';
import { Select } from '@/components/ui/select';
import { TextInput } from '@/components/ui/text-input';
import { ACTIONS } from '@/lib/domain/access';
import { AUDIT_SUBJECTS } from '@/lib/domain/audit/audit-event';
import { AUDIT_ONLY_ACTIONS, auditWords } from '@/lib/presentation/audit-words';
import type { AuditFilterInput } from '@/lib/schemas/audit/audit-filter';

/** Reading changes nothing and is not logged, so it is not offered. */
const OFFERED = [...AUDIT_ONLY_ACTIONS, ...ACTIONS.filter((action) => !/\.(read|view)$/.test(action))].sort();

/** A plain form with GET: the filter is the page's address, so it can be kept, sent and gone back to. */
export function AuditFilter({ filter }: { filter: AuditFilterInput }) {
  const filtered = Boolean(filter.action ?? filter.subject ?? filter.id ?? filter.by);
  return (
    <form
      method="get"
      aria-label="Filter the log"
      // Else the browser puts old choices back after "back", and they would not match what is listed.
      autoComplete="off"
      className="mb-5 grid grid-cols-[minmax(0,1fr)] items-end gap-4 sm:grid-cols-2 lg:grid-cols-4"
    >
      <Select
        label="Action"
        name="action"
        key={`action ${filter.action}`}
        defaultValue={filter.action ?? ''}
        placeholder="Any"
        options={OFFERED.map((action) => ({ value: action, label: `${action} · ${auditWords(action)}` }))}
      />
      <Select
        label="About"
        name="subject"
        key={`subject ${filter.subject}`}
        defaultValue={filter.subject ?? ''}
        placeholder="Anything"
        options={AUDIT_SUBJECTS.map((subject) => ({ value: subject, label: subject }))}
      />
      <TextInput
        label="Record id"
        name="id"
        key={`id ${filter.id}`}
        defaultValue={filter.id ?? ''}
        figures
        spellCheck={false}
        autoComplete="off"
      />
      {filter.by && <input type="hidden" name="by" value={filter.by} />}
      <div className="flex flex-wrap gap-3">
        <Button type="submit" variant="primary">
          Show
        </Button>
        {filtered && <LinkButton href="/site/audit">Show all</LinkButton>}
      </div>
    </form>
  );
}
