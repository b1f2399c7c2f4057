import { Panel } from '@/components/ui/panel';
import { ROLE_LABELS, type Role } from '@/lib/domain/access';
import type { EntryPlace } from '@/lib/domain/booking/entry';
import { ENTRY_WORDS, RESULT_WORDS } from '@/lib/presentation/pre-check-words';
import type { ActionResult } from '@/lib/schemas/action-result';
import type { HistoryLine } from '@/lib/schemas/booking-entry';
import type { NoteForm as Values } from './coordinator-forms';
import { NoteForm } from './note-form';

/** With its moment formatted on the server, as every page prints it. */
export type ShownLine = HistoryLine & { readonly shown: string; readonly from?: string; readonly to?: string };

export const placeText = ({ scanner, slotMinutes }: EntryPlace, when: string): string => `${scanner}, ${when}, ${slotMinutes} min`;

function Line({ line }: { line: ShownLine }) {
  const roles = (line.roles ?? []).map((role) => ROLE_LABELS[role as Role]?.toLowerCase()).filter(Boolean);
  return (
    <li className="grid gap-x-4 py-3 sm:grid-cols-[9rem_1fr]">
      <p className="figures text-sm text-ink-soft">{line.shown}</p>
      <div className="min-w-0 space-y-0.5">
        <p>
          <span className="font-semibold">{ENTRY_WORDS[line.kind]}</span>
          {line.result && `: ${RESULT_WORDS[line.result]}`}
          {line.by && <span className="text-ink-soft"> · {line.by}{roles.length > 0 && `, ${roles.join(', ')}`}</span>}
        </p>
        {line.sizes && <p className="text-sm text-ink-soft">{line.sizes.join(', ')}</p>}
        {line.from && <p className="text-sm text-ink-soft">{line.from} → {line.to}</p>}
        {line.data?.surgeryOn !== undefined && <p className="text-sm text-ink-soft">{line.data.surgeryOn === '' ? 'taken back' : line.data.surgeryOn}</p>}
        {line.note && <p className="whitespace-pre-line">{line.note}</p>}
      </div>
    </li>
  );
}

/** What people wrote on a booking and what became of it. Lines are only ever added. */
export function HistoryPanel({ lines, addNote }: { lines: readonly ShownLine[]; addNote?: (form: Values) => Promise<ActionResult<unknown>> }) {
  return (
    <Panel id="history" title="Notes and history">
      {addNote && <NoteForm label="Add a note" button="Add this note" pending="Adding…" done="The note was added." save={addNote} />}
      {lines.length === 0 ? <p className="mt-4 text-ink-soft">Nothing yet.</p> : <ol className="mt-4 divide-y divide-line">{lines.map((line) => <Line key={line.id} line={line} />)}</ol>}
    </Panel>
  );
}
