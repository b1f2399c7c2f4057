'use client';

import { Checkbox } from '@/components/ui/choice';
import { Select } from '@/components/ui/select';
import { TextArea, TextInput } from '@/components/ui/text-input';
import { Notice } from '@/components/ui/notice';
import { personalSigns } from '@/lib/domain/demonstration/capture';
import { applies, CONTROLS } from '@/lib/domain/demonstration/controls';
import { CONTROL_IDS, HIGHLIGHTS, type Highlight, type Scene, type SceneView } from '@/lib/domain/demonstration/scene';

const VIEW_WORDS: Readonly<Record<SceneView, string>> = { section: 'Section', slab: 'Slab', picture: 'Simulated picture' };
const HIGHLIGHT_WORDS: Readonly<Record<Highlight, string>> = {
  nothing: 'nothing', 'what-wraps': 'what wraps', 'keep-clear': 'the keep-clear area', 'acquired-edge': 'the acquired edge',
};

/** What is said about a scene, what it shows, and what the audience may move. */
export function SceneFacts({ scene, onChange }: { scene: Scene; onChange: (patch: Partial<Scene>) => void }) {
  const views = (['section', 'slab', 'picture'] as const).filter((view) => view !== 'slab' || scene.question.prescription.slices.mode === 'slab');
  const signs = personalSigns(`${scene.title} ${scene.note}`);
  const blank = scene.title.trim() === '';
  return (
    <div className="space-y-4">
      <TextInput
        label="Title of the scene"
        value={scene.title}
        maxLength={120}
        error={blank ? 'Nothing given; allowed: text of 1 to 120 characters.' : undefined}
        onChange={(event) => onChange({ title: event.target.value })}
      />
      <TextArea label="Presenter’s note" rows={5} maxLength={4000} value={scene.note} hint="Shown in the presenter’s window only; never by a shared link." onChange={(event) => onChange({ note: event.target.value })} />
      {signs.length > 0 && (
        <Notice title="Is this about one person?" live>
          The text holds what looks like {signs.join(' and ')}. A demonstration has no patient in it: take it out if it is one’s.
        </Notice>
      )}
      <Select<SceneView> label="View" value={scene.view} options={views.map((value) => ({ value, label: VIEW_WORDS[value] }))} onChange={(event) => onChange({ view: event.target.value as SceneView })} />
      <Select<Highlight> label="Highlighted" value={scene.highlight} options={HIGHLIGHTS.map((value) => ({ value, label: HIGHLIGHT_WORDS[value] }))} onChange={(event) => onChange({ highlight: event.target.value as Highlight })} />
      <fieldset>
        <legend className="mb-1 text-sm font-semibold">The audience may move</legend>
        {CONTROL_IDS.filter((id) => applies(id, scene.question)).map((id) => (
          <Checkbox
            key={id}
            label={CONTROLS[id].label}
            checked={scene.controls.includes(id)}
            onChange={(event) =>
              onChange({ controls: event.target.checked ? [...scene.controls, id] : scene.controls.filter((each) => each !== id) })
            }
          />
        ))}
      </fieldset>
    </div>
  );
}
