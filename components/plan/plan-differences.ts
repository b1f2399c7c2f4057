import { formDifferences } from '@/components/ui/form-differences';
import { numberFacts, schemaAt } from '@/components/ui/schema-facts';
import type { Verdict } from '@/lib/physics/model/assessment';
import { ARM_WORDS, AXIS_WORDS, FAMILY_WORDS, PLANE_WORDS, SOURCE_WORDS } from '@/lib/presentation/anatomy-words';
import { VERDICT_WORDS } from '@/lib/presentation/verdict-words';
import { keepClearSchema } from '@/lib/schemas/case/keep-clear';
import { patientSchema } from '@/lib/schemas/case/patient';
import { prescriptionSchema } from '@/lib/schemas/case/prescription';
import type { PlannedSequence, PlanView } from '@/lib/schemas/plan';
import type * as z from 'zod';
import { keepClearWords } from './sheet-words';

export interface ChangedField {
  readonly key: string;
  readonly field: string;
  readonly before: string;
  readonly after: string;
}

export interface ChangedPart {
  readonly key: string;
  readonly name: string;
  readonly fields: readonly ChangedField[];
}

export interface VerdictChange {
  readonly id: string;
  readonly name: string;
  /** Absent where the sequence is not in that version. */
  readonly before?: Verdict;
  readonly after?: Verdict;
}

export interface PlanComparison {
  readonly verdicts: readonly VerdictChange[];
  readonly parts: readonly ChangedPart[];
}

const CODES: Readonly<Record<string, string>> = { ...ARM_WORDS, ...AXIS_WORDS, ...FAMILY_WORDS, ...PLANE_WORDS, ...SOURCE_WORDS };
const SIDES = /^extents\.(\w+)\.(\w+)$/;
const LEAF_WORDS: Readonly<Record<string, string>> = { value: 'size', spread: 'spread', source: 'how got', takenOn: 'taken on' };
const capital = (words: string): string => words.charAt(0).toUpperCase() + words.slice(1);

/** The schema's words name the field; one number of a reading says by itself neither which side nor what. */
function fieldWords(path: string, words: string): string {
  const [, side, leaf] = SIDES.exec(path) ?? [];
  if (side && leaf) return `${capital(side)}, ${LEAF_WORDS[leaf] ?? leaf}`;
  const [head, last] = [path.split('.').at(0)!, path.split('.').at(-1)!];
  if (head !== last && last in LEAF_WORDS) return `${capital(head.replace(/(Kg|Cm|S|Mm)$/, '').replace(/([A-Z])/g, ' $1').toLowerCase())}, ${LEAF_WORDS[last]}`;
  return words;
}

function shown(text: string, schema: z.ZodType, path: string): string {
  const found = schemaAt(schema, path.split('.'));
  const unit = found && /^\u2212?[\d.]/.test(text) ? numberFacts(found).unit : undefined;
  return unit ? `${text} ${unit}` : (CODES[text] ?? text);
}

function changedFields(schema: z.ZodType, before: unknown, after: unknown): ChangedField[] {
  return formDifferences(schema, before, after).map(({ path, words, theirs, mine }) => ({
    key: path,
    field: fieldWords(path, words),
    before: shown(theirs, schema, path),
    after: shown(mine, schema, path),
  }));
}

const adopted = (sequence: PlannedSequence): string => sequence.adopted.map(({ sentence }) => sentence).join(' ') || 'none';

function changedSequence(before: PlannedSequence | undefined, after: PlannedSequence | undefined): ChangedField[] {
  if (!before || !after) {
    return [{ key: 'sequence', field: 'Sequence', before: before ? 'planned' : 'not in it', after: after ? 'planned' : 'not in it' }];
  }
  const area = ({ frozenKeepClear }: PlannedSequence) => (frozenKeepClear ? keepClearWords(frozenKeepClear) : 'as for all sequences');
  return [
    ...changedFields(prescriptionSchema, before.prescription, after.prescription),
    { key: 'adopted', field: 'Adopted', before: adopted(before), after: adopted(after) },
    { key: 'frozen', field: 'Keep-clear area of its own', before: area(before), after: area(after) },
  ].filter((field) => field.before !== field.after);
}

/** What two versions of a plan differ in, in words: the verdict of every sequence, then each field that changed. */
export function comparePlans(before: PlanView, after: PlanView): PlanComparison {
  const ids = [...new Set([...before.sequences, ...after.sequences].map(({ id }) => id))];
  const find = (plan: PlanView, id: string) => {
    const index = plan.sequences.findIndex((sequence) => sequence.id === id);
    return { sequence: plan.sequences[index], verdict: plan.results[index]?.verdict };
  };
  const sequences = ids.map((id) => {
    const [a, b] = [find(before, id), find(after, id)];
    return { id, name: (b.sequence ?? a.sequence)!.prescription.name, a, b };
  });
  const basis: ChangedField[] = [
    { key: 'scanner', field: 'Scanner', before: `${before.scanner.name}, version ${before.scannerVersion}`, after: `${after.scanner.name}, version ${after.scannerVersion}` },
    { key: 'policy', field: 'Site policy', before: `version ${before.policy.version}`, after: `version ${after.policy.version}` },
    { key: 'engine', field: 'Engine', before: before.engineVersion, after: after.engineVersion },
    { key: 'note', field: 'Note', before: before.note || 'none', after: after.note || 'none' },
  ].filter((field) => field.before !== field.after);
  const area = changedFields(keepClearSchema, before.keepClear, after.keepClear);
  return {
    verdicts: sequences.map(({ id, name, a, b }) => ({
      id, name, ...(a.verdict ? { before: a.verdict } : {}), ...(b.verdict ? { after: b.verdict } : {}),
    })),
    parts: [
      { key: 'patient', name: 'Patient', fields: changedFields(patientSchema, before.patient, after.patient) },
      {
        key: 'keep-clear', name: 'Keep-clear area',
        fields: area.length === 0 ? [] : [{ key: 'area', field: 'Area', before: keepClearWords(before.keepClear), after: keepClearWords(after.keepClear) }],
      },
      ...sequences.map(({ id, name, a, b }) => ({ key: id, name, fields: changedSequence(a.sequence, b.sequence) })),
      { key: 'basis', name: 'What it rests on', fields: basis },
    ].filter(({ fields }) => fields.length > 0),
  };
}

export const verdictOrAbsent = (verdict: Verdict | undefined): string => (verdict ? VERDICT_WORDS[verdict] : 'not in it');
