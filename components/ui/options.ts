import type { SelectOption } from './select';

/** A table of words as the options of a choice, in the table's order. */
export function optionsOf<T extends string>(words: Readonly<Record<T, string>>): SelectOption<T>[] {
  return (Object.entries(words) as [T, string][]).map(([value, label]) => ({ value, label }));
}
