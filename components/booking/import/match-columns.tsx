'use client';

import { Segmented } from '@/components/ui/choice';
import { Panel } from '@/components/ui/panel';
import { Select } from '@/components/ui/select';
import {
  IMPORT_FIELD_LABELS, IMPORT_FIELDS, isSizeField, LENGTH_UNITS, MASS_UNITS, type ImportField, type ImportSettings, type SizeUnit,
} from '@/lib/domain/import';

const REQUIRED: readonly ImportField[] = ['accession', 'scanner', 'protocol'];
const LENGTHS = LENGTH_UNITS.map((value) => ({ value, label: value === 'in' ? 'inches' : value }));
const MASSES = MASS_UNITS.map((value) => ({ value, label: value }));

/** Which column is what, and in which unit. A column that nobody matches is not read. */
export function MatchColumns({
  columns, settings, slotMinutes, onColumns, onChange,
}: {
  columns: readonly string[];
  settings: ImportSettings;
  slotMinutes: number;
  onColumns: (columns: ImportSettings['columns']) => void;
  onChange: (change: Partial<ImportSettings>) => void;
}) {
  const options = columns.map((title) => ({ value: title, label: title }));
  const map = (field: ImportField, title: string) => {
    const { [field]: _before, ...rest } = settings.columns;
    onColumns(title === '' ? rest : { ...rest, [field]: title });
  };
  return (
    <Panel title="Columns">
      <p className="mb-4 text-ink-soft">
        What is matched here is kept for the next file. Columns that are not matched are not read. Without a slot column a slot is {slotMinutes} minutes.
      </p>
      <div className="grid gap-x-6 gap-y-4 sm:grid-cols-2 lg:grid-cols-3">
        {IMPORT_FIELDS.map((field) => {
          const size = isSizeField(field) ? field : undefined;
          return (
            <div key={field} className="flex items-end gap-2">
              <Select
                className="min-w-0 flex-1"
                label={IMPORT_FIELD_LABELS[field]}
                required={REQUIRED.includes(field)}
                value={settings.columns[field] ?? ''}
                placeholder="Not in this file"
                options={options}
                onChange={(event) => map(field, event.target.value)}
              />
              {size && settings.columns[size] && (
                <Select
                  className="w-28 flex-none"
                  label="Unit"
                  aria-label={`Unit of ${IMPORT_FIELD_LABELS[size]}`}
                  value={settings.units[size] ?? ''}
                  placeholder="Choose"
                  options={size === 'weight' ? MASSES : LENGTHS}
                  onChange={(event) => onChange({ units: { ...settings.units, [size]: event.target.value as SizeUnit } })}
                />
              )}
            </div>
          );
        })}
      </div>
      <div className="mt-5 flex flex-wrap gap-x-8 gap-y-4">
        <Segmented
          legend="Days such as 03/04/2026"
          value={settings.dateOrder}
          options={[{ value: 'day-first', label: 'Day first' }, { value: 'month-first', label: 'Month first' }]}
          onChange={(dateOrder) => onChange({ dateOrder })}
        />
        <Segmented
          legend="Sizes in this file were"
          value={settings.source}
          options={[{ value: 'reported', label: 'Reported' }, { value: 'measured', label: 'Measured by staff' }]}
          onChange={(source) => onChange({ source })}
        />
      </div>
    </Panel>
  );
}
