import type { SizeQuantity } from '@/lib/domain/size-reading/quantities';

/** Quantities that are one of a few words, kept as the number of the word. */
export const CODED: Partial<
  Record<SizeQuantity, readonly { readonly value: string; readonly label: string }[]>
> = {
  'arms-position': [
    { value: '0', label: 'down' },
    { value: '1', label: 'up' },
    { value: '2', label: 'cannot be raised' },
  ],
  sex: [
    { value: '1', label: 'female' },
    { value: '2', label: 'male' },
  ],
};
