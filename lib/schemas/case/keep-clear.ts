import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import type { KeepClear, PatientBox } from '@/lib/domain/case/model';
import { boxRange } from '@/lib/schemas/case/patient';
import { flag, refused, strict, words } from '@/lib/schemas/fields/fields';

type ShapeOf<T> = { readonly [K in keyof T]-?: z.ZodType<T[K]> };

export const patientBoxSchema = strict(
  {
    xMm: boxRange('From the patient’s right (negative) to left [mm].'),
    yMm: boxRange('From anterior (negative) to posterior [mm].'),
    zMm: boxRange('From inferior (negative) to superior [mm].'),
  } satisfies ShapeOf<PatientBox>,
  'Box in patient coordinates.',
);

export const keepClearShape = {
  area: z
    .discriminatedUnion(
      'kind',
      [
        strict({ kind: z.literal('whole-picture').describe('All that is displayed.') }),
        strict({
          kind: z.literal('box'),
          box: patientBoxSchema,
          label: words(60, 'What the box holds, shown beside it.').optional(),
        }),
      ],
      { error: refused('an area whose kind is whole-picture or box') },
    )
    .describe('What must stay free of fold, fixed in the patient.'),
  mustStayDisplayed: patientBoxSchema
    .describe('Anatomy that must stay displayed; left out: the keep-clear area alone.')
    .optional(),
  followsWindow: flag('The area follows the window when it is recentred.'),
} satisfies ShapeOf<KeepClear>;

export const keepClearSchema = strict(keepClearShape, 'The keep-clear area, as the engine takes it.');
