'use client';

import type * as z from 'zod';
import { numberFacts } from '@/components/ui/schema-facts';
import { Select, type SelectOption } from '@/components/ui/select';
import { useCommit } from '../bench-form';
import { BenchNumber } from '../bench-number';
import { optionsOf } from '../bench-choice';

const KNOWN_OPTIONS: readonly SelectOption<'unknown' | 'known'>[] = [
  { value: 'unknown', label: 'not known' },
  { value: 'known', label: 'known' },
];

/** A number that nobody may have told: "not known" is a value of its own, said together with what stands in for it. */
export function OptionalNumber(props: {
  readonly path: string;
  readonly schema: z.ZodType;
  readonly value: number | undefined;
  /** Where typing begins when it becomes known. */
  readonly start: number;
  readonly label: string;
  readonly unknownHint: string;
  readonly step: number;
  readonly sliderMax: number;
}) {
  const { path, schema, value, start, label, unknownHint, step, sliderMax } = props;
  const commit = useCommit();
  const known = value !== undefined;
  const { min } = numberFacts(schema);
  return (
    <div className="mt-1.5">
      <Select
        compact
        layout="row"
        name={`${path}.known`}
        label={label}
        options={KNOWN_OPTIONS}
        value={known ? 'known' : 'unknown'}
        hint={known ? undefined : unknownHint}
        onChange={(event) => commit(path, event.target.value === 'known' ? start : undefined)}
      />
      {known && <BenchNumber path={path} schema={schema} label={label} step={step} sliderMin={min} sliderMax={sliderMax} />}
    </div>
  );
}

/** One of a few words, or not known. */
export function OptionalChoice<T extends string>({
  path,
  value,
  label,
  options,
  unknownLabel,
}: {
  path: string;
  value: T | undefined;
  label: string;
  options: Readonly<Record<T, string>>;
  unknownLabel: string;
}) {
  const commit = useCommit();
  return (
    <Select<T | ''>
      compact
      layout="row"
      className="mt-1.5"
      name={path}
      label={label}
      options={[{ value: '', label: unknownLabel }, ...optionsOf<T>(options)]}
      value={value ?? ''}
      onChange={(event) => commit(path, event.target.value === '' ? undefined : event.target.value)}
    />
  );
}
