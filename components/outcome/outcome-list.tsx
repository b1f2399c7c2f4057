import { Fact, Facts } from '@/components/ui/figure';
import type { Prescription } from '@/lib/physics/model/prescription';
import type { Scanner } from '@/lib/physics/model/scanner';
import { formatMoment } from '@/lib/presentation/moment';
import { WRAP_WORDS } from '@/lib/presentation/outcome-words';
import { phaseOversamplingSetting, sliceOversamplingSetting } from '@/lib/presentation/oversampling-form';
import { formatShort } from '@/lib/presentation/round';
import type { OutcomeView } from '@/lib/schemas/outcome';
import type { PlanView } from '@/lib/schemas/plan';

/** What was used, in the scanner's own form; a planned sequence with the lines that were acquired. */
function usedWords(used: OutcomeView['sequences'][number], planned: Prescription | undefined, scanner: Scanner): string {
  if (!planned) return `${used.acquiredLines} lines`;
  const { slices } = planned;
  const prescription: Prescription = {
    ...planned,
    acquiredLines: used.acquiredLines,
    slices: slices.mode === 'slab' ? { ...slices, acquiredPartitions: used.acquiredPartitions ?? slices.acquiredPartitions } : slices,
  };
  const phase = phaseOversamplingSetting(prescription, scanner).value;
  const slice = sliceOversamplingSetting(prescription, scanner)?.value;
  const same =
    planned.acquiredLines === used.acquiredLines &&
    (slices.mode !== 'slab' || used.acquiredPartitions === undefined || used.acquiredPartitions === slices.acquiredPartitions);
  return `${slice ? `phase ${phase}, slice ${slice}` : phase}${same ? ', as planned' : ', not as planned'}`;
}

/** What came of a plan, newest first. */
export function OutcomeList({ outcomes, plan }: { outcomes: readonly OutcomeView[]; plan: PlanView }) {
  return (
    <ol className="space-y-4">
      {outcomes.map((outcome, index) => (
        <li key={outcome.id} data-outcome={outcome.wrap} className="border-l-4 border-line-strong pl-4">
          <p className="font-semibold">
            {WRAP_WORDS[outcome.wrap]}
            {outcome.repeated && '; scanned again because of fold'}
          </p>
          <p className="text-sm text-ink-soft">
            Version {outcome.planVersion}, {formatMoment(new Date(outcome.at))}, {outcome.by}
            {index < outcomes.length - 1 && '. Corrects the one below'}
          </p>
          <Facts className="mt-1 text-sm">
            {outcome.sequences.map((used) => (
              <Fact key={used.id} name={used.name}>
                <span className="figures">{usedWords(used, plan.sequences.find(({ id }) => id === used.id)?.prescription, plan.scanner)}</span>
              </Fact>
            ))}
            <Fact name="Scan time">
              <span className="figures">{formatShort(outcome.minutes, 0.1)}</span> min
            </Fact>
            {outcome.note && <Fact name="Note">{outcome.note}</Fact>}
          </Facts>
        </li>
      ))}
    </ol>
  );
}
