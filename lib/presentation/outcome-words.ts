import type { Wrap } from '@/lib/domain/outcome/document';

export const WRAP_WORDS: Readonly<Record<Wrap, string>> = {
  none: 'No wrap seen',
  outside: 'Wrap outside the keep-clear area',
  inside: 'Wrap inside the keep-clear area',
};

/** Short enough for three choices side by side. */
export const WRAP_CHOICES: readonly { readonly value: Wrap; readonly label: string }[] = [
  { value: 'none', label: 'None' },
  { value: 'outside', label: 'Outside the area' },
  { value: 'inside', label: 'Inside the area' },
];
