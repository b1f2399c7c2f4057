import '@/lib/schemas/fields/jitless';
import * as z from 'zod';
import type { BodyRegion, KeepClear, Prescription } from '@/lib/domain/case/model';
import { keepClearSchema } from '@/lib/schemas/case/keep-clear';
import { REGIONS } from '@/lib/schemas/case/patient';
import { prescriptionSchema } from '@/lib/schemas/case/prescription';
import { choice, refused, strict, words } from '@/lib/schemas/fields/fields';
import { expectedVersionSchema, idSchema } from '@/lib/schemas/fields/ids';

/** What the protocol form holds: its sequences in the order they are run. */
export const protocolFormSchema = strict({
  name: words(80, 'Name of the protocol.'),
  region: choice(REGIONS, 'Body part.'),
  keepClearPreset: words(60, 'Key of the keep-clear preset the protocol starts from, or “own” when its box was typed.'),
  keepClear: keepClearSchema,
  sequences: z
    .array(prescriptionSchema)
    .min(1, { error: refused('1 to 20 sequences') })
    .max(20, { error: refused('1 to 20 sequences') })
    .describe('Sequences in the order they are run.'),
}).superRefine((value, context) => {
  const seen = new Set<string>();
  value.sequences.forEach(({ name }, index) => {
    if (seen.has(name)) {
      context.addIssue({
        code: 'custom', path: ['sequences', index, 'name'],
        message: `“${name}” is given twice; allowed: a name of its own for each sequence`,
      });
    }
    seen.add(name);
  });
});
export type ProtocolForm = z.output<typeof protocolFormSchema>;

export const createProtocolInput = protocolFormSchema;
export const editProtocolInput = strict({ id: idSchema, expectedVersion: expectedVersionSchema, form: protocolFormSchema });
export const archiveProtocolInput = strict({ id: idSchema, expectedVersion: expectedVersionSchema });

export interface SequenceView {
  readonly id: string;
  readonly position: number;
  readonly prescription: Prescription;
}

export interface ProtocolView {
  readonly id: string;
  readonly version: number;
  readonly archived: boolean;
  readonly name: string;
  readonly region: BodyRegion;
  readonly keepClearPreset: string;
  readonly keepClear: KeepClear;
  readonly sequences: readonly SequenceView[];
  readonly changedAt: string;
}

export interface ProtocolListItem {
  readonly id: string;
  readonly version: number;
  readonly archived: boolean;
  readonly name: string;
  readonly region: BodyRegion;
  readonly sequenceCount: number;
  readonly changedAt: string;
}
