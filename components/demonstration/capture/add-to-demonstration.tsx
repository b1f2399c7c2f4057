'use client';

import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { useState } from 'react';
import { useActiveResult, useBench, useBenchState } from '@/components/bench/bench-context';
import { triedCase } from '@/components/bench/state/case-of';
import { shownSlice } from '@/components/bench/state/slices';
import { Button } from '@/components/ui/button';
import { FormProblem } from '@/components/ui/form-problem';
import { Notice } from '@/components/ui/notice';
import { Select } from '@/components/ui/select';
import { TextInput } from '@/components/ui/text-input';
import { captureCase, CAPTURE_STEP_MM, personalSigns } from '@/lib/domain/demonstration/capture';
import { applies } from '@/lib/domain/demonstration/controls';
import type { SceneDocument } from '@/lib/domain/demonstration/scene';
import type { ErrorView } from '@/lib/domain/errors';
import type { ActionResult } from '@/lib/schemas/action-result';

export interface CaptureProps {
  readonly demonstrations: readonly { readonly id: string; readonly title: string }[];
  /** Of the booking on the bench: it must not come along. */
  readonly reference?: string;
  readonly add: (input: { demonstrationId: string; scene: SceneDocument }) => Promise<ActionResult<{ id: string; title: string }>>;
  /** Makes a demonstration that begins with this scene. */
  readonly begin: (input: { title: string; scene: SceneDocument }) => Promise<ActionResult<{ id: string }>>;
}

const NEW = 'new';

/** Takes what the bench shows, with what is tried, as the next scene of a demonstration or the first of a new one. */
export function AddToDemonstration({ demonstrations, add, begin, reference }: CaptureProps) {
  const router = useRouter();
  const { store } = useBench();
  const { question } = useActiveResult();
  const sequenceName = useBenchState((state) => state.document.sequences.find(({ id }) => id === state.activeId)?.prescription.name ?? '');
  const [open, setOpen] = useState(false);
  const [target, setTarget] = useState(demonstrations[0]?.id ?? NEW);
  const [title, setTitle] = useState('');
  const [newTitle, setNewTitle] = useState('');
  const [pending, setPending] = useState(false);
  const [problem, setProblem] = useState<Pick<ErrorView, 'message' | 'incidentId'> | null>(null);
  const [added, setAdded] = useState<{ demonstrationId: string; title: string } | null>(null);
  const name = title.trim() || sequenceName;
  const anew = target === NEW;
  const signs = personalSigns(anew ? `${newTitle} ${name}` : name, reference);

  const take = async () => {
    const { trial, activeId, view, sliceIndex } = store.read();
    const { patient, prescription, keepClear, scanner, policy } = trial?.sequenceId === activeId ? triedCase(question, trial.remedy) : question;
    const captured = captureCase({ patient, prescription, keepClear, scanner, policy });
    const scene: SceneDocument = {
      schemaVersion: 1,
      title: name.slice(0, 120),
      note: '',
      question: captured,
      view: view === 'bore' ? 'section' : view,
      highlight: 'what-wraps',
      sliceOffsetMm: shownSlice(prescription, sliceIndex[activeId]).offsetMm,
      controls: (['phase-oversampling', 'slice-oversampling'] as const).filter((id) => applies(id, captured)),
    };
    setPending(true);
    const added = async (): Promise<ActionResult<{ demonstrationId: string; title: string }>> => {
      if (!anew) {
        const result = await add({ demonstrationId: target, scene });
        return result.ok ? { ok: true, data: { demonstrationId: target, title: result.data.title } } : result;
      }
      const result = await begin({ title: newTitle, scene });
      return result.ok ? { ok: true, data: { demonstrationId: result.data.id, title: newTitle.trim() } } : result;
    };
    const result = await added().catch(() => null);
    setPending(false);
    if (!result?.ok) return setProblem(result?.error ?? { message: 'The server did not answer. Nothing was added; try again shortly.' });
    setProblem(null);
    setTitle('');
    setAdded(result.data);
    if (!anew) return;
    // The next scene goes into the one just made.
    setTarget(result.data.demonstrationId);
    setNewTitle('');
    router.refresh();
  };

  // One that was just made may not be in the list that came with the page.
  const made = added && !demonstrations.some(({ id }) => id === added.demonstrationId) ? [{ id: added.demonstrationId, title: added.title }] : [];
  const options = [...[...made, ...demonstrations].map(({ id, title: label }) => ({ value: id, label })), { value: NEW, label: 'A new demonstration' }];

  if (!open) {
    return (
      <Button size="sm" className="mt-2" onClick={() => setOpen(true)}>Add to a demonstration</Button>
    );
  }
  return (
    <form
      aria-label="Add to a demonstration"
      className="mt-2 space-y-2"
      onSubmit={(event) => {
        event.preventDefault();
        void take();
      }}
    >
      <Select label="Demonstration" compact value={target} options={options} onChange={(event) => setTarget(event.target.value)} />
      {anew && <TextInput label="Title of the demonstration" maxLength={120} required value={newTitle} onChange={(event) => setNewTitle(event.target.value)} />}
      <TextInput label="Title of the scene" placeholder={sequenceName} maxLength={120} value={title} onChange={(event) => setTitle(event.target.value)} />
      <p className="text-sm text-ink-soft">Extents go in on {CAPTURE_STEP_MM} mm steps, without reference, dates and names.</p>
      {signs.length > 0 && <Notice live title="Is this about one person?">The title holds what looks like {signs.join(' and ')}.</Notice>}
      <FormProblem problem={problem} />
      {added && (
        <Notice tone="done" live>
          Added to <Link href={`/demonstrations/${added.demonstrationId}`} className="text-link">“{added.title}”</Link>.
        </Notice>
      )}
      <div className="flex gap-2">
        <Button size="sm" type="submit" variant="primary" pending={pending} disabled={anew && newTitle.trim() === ''} pendingLabel="Adding …">{anew ? 'Make it with this scene' : 'Add the scene'}</Button>
        <Button size="sm" onClick={() => setOpen(false)}>Close</Button>
      </div>
    </form>
  );
}
