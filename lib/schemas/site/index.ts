import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import { maskRefusal } from '@/lib/domain/booking/accession';
import { refused, strict, words } from '@/lib/schemas/fields/fields';

export const siteFormSchema = strict({
  name: words(120, 'Name of the site, as people see it.'),
  accessionMask: z
    .string({ error: refused('a mask such as HB-####') })
    .trim()
    .superRefine((mask, context) => {
      const refusal = maskRefusal(mask);
      if (refusal) context.addIssue({ code: 'custom', message: refusal });
    })
    .describe('Form of the accession numbers: # a digit, @ a letter, ? either, * any run; all else stands for itself.'),
});
export type SiteForm = z.output<typeof siteFormSchema>;
export type SiteView = SiteForm & { readonly id: string };
