'use client';

import { Checkbox } from '@/components/ui/choice';
import { TRAJECTORIES } from '@/lib/schemas/case/prescription';
import type { Trajectory } from '@/lib/physics/model/prescription';
import { TRAJECTORY_WORDS } from '@/lib/presentation/setup-words';
import { BenchChoice, optionsOf } from '../bench-choice';
import { useBenchState } from '../bench-context';
import { useCommit } from '../bench-form';
import { BenchText } from '../bench-text';
import { Group, type GroupProps } from './group';

/** What the sequence is called, how it runs through k-space, and with which coil. */
export function ReceiveGroup({ prescription: p, ...panel }: GroupProps) {
  const coils = useBenchState((state) => state.document.scanner.coils);
  const described = coils?.find(({ name }) => name === p.coil);
  return (
    <Group title="Coil and name" summary={p.coil} {...panel}>
      <BenchText path="coil" label="Coil" suggestions={coils?.map(({ name }) => name) ?? []} />
      {described ? (
        <Elements key={described.name} all={described.elements.map(({ name }) => name)} used={p.coilElements} />
      ) : (
        <p data-field="coilElements" className="mt-1 text-sm text-ink-soft">
          The site has not described this coil’s elements: all of them are used.
        </p>
      )}
      <BenchChoice<Trajectory> path="trajectory" label="Sampling" options={optionsOf(TRAJECTORY_WORDS, TRAJECTORIES)} className="mt-1.5" />
      <BenchText path="name" label="Name" className="mt-1.5" />
    </Group>
  );
}

/** Elements that are used; one at least. All of them is "not listed", as a protocol without a choice has it. */
function Elements({ all, used }: { all: readonly string[]; used: readonly string[] | undefined }) {
  const commit = useCommit();
  const chosen = used ?? all;
  const toggle = (name: string, on: boolean) => {
    const next = all.filter((each) => (each === name ? on : chosen.includes(each)));
    commit('coilElements', next.length === all.length ? undefined : next);
  };
  return (
    <fieldset data-field="coilElements" className="mt-1">
      <legend className="text-sm text-ink-soft">Elements used</legend>
      <div className="grid grid-cols-2 gap-x-4 text-sm">
        {all.map((name) => {
          const on = chosen.includes(name);
          return (
            <Checkbox
              key={name}
              label={name}
              checked={on}
              disabled={on && chosen.length === 1}
              onChange={(event) => toggle(name, event.target.checked)}
            />
          );
        })}
      </div>
    </fieldset>
  );
}
