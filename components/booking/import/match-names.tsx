'use client';

import { Panel } from '@/components/ui/panel';
import { Select } from '@/components/ui/select';
import { nameKey } from '@/lib/domain/import/read-row';

/** The file's words for scanners or protocols, each with the one of the site it means. */
export function MatchNames({
  title, what, names, ids, known, onChange,
}: {
  title: string;
  what: string;
  names: readonly string[];
  ids: Readonly<Record<string, string>>;
  known: readonly { readonly id: string; readonly name: string }[];
  onChange: (ids: Record<string, string>) => void;
}) {
  return (
    <Panel title={title}>
      {names.length === 0 ? (
        <p className="text-ink-soft">No column with {what} is matched, or it is empty.</p>
      ) : (
        <div className="grid gap-x-6 gap-y-4 sm:grid-cols-2">
          {names.map((name) => (
            <Select
              key={name}
              label={<span className="figures">{name}</span>}
              value={ids[nameKey(name)] ?? ''}
              placeholder="None: leave these rows out"
              options={known.map((one) => ({ value: one.id, label: one.name }))}
              onChange={(event) => onChange({ ...ids, [nameKey(name)]: event.target.value })}
            />
          ))}
        </div>
      )}
    </Panel>
  );
}
