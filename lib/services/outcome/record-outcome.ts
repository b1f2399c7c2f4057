import { inTransaction } from '@/db/client';
import { insertOutcome, listOutcomes } from '@/db/queries/outcome/outcomes';
import { DomainError, type Scanner } from '@/lib/domain/case/model';
import { linesOfSetting, partitionsOfSetting } from '@/lib/domain/case/oversampling-used';
import { invalidField, ServiceError } from '@/lib/domain/errors';
import type { UsedSequence } from '@/lib/domain/outcome/document';
import type { PlanRecord } from '@/lib/domain/plan/plan';
import { phaseSettingNumber, sliceSettingNumber } from '@/lib/presentation/oversampling-used';
import { type OutcomeForm, type OutcomeView, recordOutcomeInput } from '@/lib/schemas/outcome';
import { parseInput } from '@/lib/schemas/parse-input';
import { recordAudit } from '../audit/record-audit';
import { authorOf } from '../author';
import { readPlannedSetup } from '../booking/read-booking-setup';
import { nowOf, type ServiceContext } from '../context';
import { lockExpectedPlan, moveLockedPlan } from '../plan/move-plan';
import { toOutcomeView } from './to-outcome-view';

/** A setting that was left as it was filled in is what was planned, whatever its rounding. */
function usedSequence(
  planned: PlanRecord['document']['sequences'][number],
  used: OutcomeForm['sequences'][number],
  scanner: Scanner,
): UsedSequence {
  const { prescription } = planned;
  const { slices } = prescription;
  const slice = sliceSettingNumber(prescription, scanner);
  const asPlanned = used.phase === phaseSettingNumber(prescription, scanner).value;
  const sliceAsPlanned = used.slice === undefined || used.slice === slice?.value;
  const partitions =
    slices.mode !== 'slab' ? undefined
      : sliceAsPlanned ? slices.acquiredPartitions
        : partitionsOfSetting(prescription, scanner, used.slice!);
  return {
    id: planned.id,
    name: prescription.name,
    acquiredLines: asPlanned ? prescription.acquiredLines : linesOfSetting(prescription, scanner, used.phase),
    ...(partitions === undefined ? {} : { acquiredPartitions: partitions }),
  };
}

function usedSequences(plan: PlanRecord, form: OutcomeForm, scanner: Scanner): UsedSequence[] {
  return form.sequences.map((used, index) => {
    const planned = plan.document.sequences.find(({ id }) => id === used.id);
    if (!planned) throw invalidField(`sequences.${index}.id`, 'not a sequence of this plan; allowed: one of its own');
    try {
      return usedSequence(planned, used, scanner);
    } catch (error) {
      if (error instanceof DomainError) throw invalidField(`sequences.${index}.phase`, error.message);
      throw error;
    }
  });
}

/**
 * What came of a plan at the scanner. The plan becomes used; an outcome of a used plan is a correction and stands
 * beside the first. The same outcome sent twice is one.
 */
export async function recordOutcome(context: ServiceContext, input: unknown): Promise<OutcomeView> {
  const { planId, id, expectedVersion, ...form } = parseInput(recordOutcomeInput, input);
  const { siteId } = context.actor;
  const now = nowOf(context);
  return inTransaction(siteId, async (trx) => {
    const plan = await lockExpectedPlan(trx, context, { id: planId, expectedVersion, action: 'outcome.record' });
    const { scanner } = await readPlannedSetup(trx, plan);
    const sequences = usedSequences(plan, form, scanner);
    const isNew = await insertOutcome(trx, {
      siteId, id, planId, planVersion: plan.version, wrap: form.wrap,
      document: { schemaVersion: 1, sequences, minutes: form.minutes, repeated: form.repeated, note: form.note },
      recordedBy: authorOf(context.actor), now,
    });
    if (isNew) {
      const fields = ['wrap', 'sequences', 'minutes', 'repeated', ...(form.note === '' ? [] : ['note'])];
      if (plan.state !== 'used') {
        await moveLockedPlan(trx, context, plan, 'used');
        await recordAudit(trx, context, { action: 'plan.use', subjectType: 'plan', subjectId: planId, fields: ['state'] });
      }
      await recordAudit(trx, context, { action: 'outcome.record', subjectType: 'outcome', subjectId: id, fields });
    }
    const stored = (await listOutcomes(trx, siteId, planId)).find((outcome) => outcome.id === id);
    // The id is taken by an outcome of another plan: a caller's mistake that must not read as done.
    if (!stored) throw new ServiceError('conflict', { message: 'This outcome belongs to another plan. Nothing was recorded.' });
    return toOutcomeView(stored);
  });
}
