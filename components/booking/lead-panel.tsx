import { Panel } from '@/components/ui/panel';
import type { ActionResult } from '@/lib/schemas/action-result';
import type { NoteForm as Values } from './coordinator-forms';
import { NoteForm } from './note-form';

type Save = (form: Values) => Promise<ActionResult<unknown>>;

/** Asking a lead, and the lead's answer. The answer is written down; it changes no limit. */
export function LeadPanel({ escalation, ask, decide }: { escalation?: 'open' | 'decided'; ask?: Save; decide?: Save }) {
  if (escalation === 'open') {
    return (
      <Panel id="lead" title="A lead was asked to decide">
        {decide
          ? <NoteForm label="Your decision" button="Write this decision down" pending="Writing…" done="The decision was written down." variant="primary" save={decide} />
          : <p>It is with the leads of your site. The question and the answer are in the history below.</p>}
      </Panel>
    );
  }
  if (!ask) return null;
  return (
    <Panel id="lead" title={escalation === 'decided' ? 'Ask a lead again' : 'Ask a lead to decide'} collapsible defaultOpen={false} summary="When nothing works">
      <NoteForm label="What is to be decided" button="Ask a lead" pending="Asking…" done="The leads of your site see it on their Today page." save={ask} />
    </Panel>
  );
}
