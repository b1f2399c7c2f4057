import { DomainError, type Assessment, type Case, type Reading } from '@/lib/domain/case/model';
import { assess, foldProbability, rankRemedies } from '@/lib/physics';
import { normalQuantile } from '@/lib/physics/certainty/normal';
import type { Finding, SequenceCheck } from './result';

export interface SequencesAnswer {
  readonly findings: readonly Finding[];
  readonly sequences: readonly SequenceCheck[];
  readonly scanMinutes: number;
}

interface Options {
  /** A radiologist has signed off what is left in the keep-clear area. */
  readonly signedOff: boolean;
  /** Fold probabilities are worked out for the booked scanner only: they take most of the time. */
  readonly probabilities: boolean;
}

/** Whether a verdict needs nothing more, within what the policy tolerates outside the keep-clear area. */
function passes({ verdict, fold }: Assessment, { policy }: Case): boolean {
  if (verdict === 'no-fold-expected') return true;
  return verdict === 'fold-outside-keep-clear' && (fold?.displayedShare ?? 1) * 100 <= policy.tolerateFoldOutsidePct;
}

function probabilityOf(question: Case): number | undefined {
  try {
    return Math.round(foldProbability(question).probability * 1e4) / 1e4;
  } catch (error) {
    if (error instanceof DomainError) return undefined;
    throw error;
  }
}

/** What a sequence that does not pass calls for: a plan where some remedy is enough, else another scanner. */
function foldFinding(question: Case, now: Assessment, remedy: string | undefined): Finding {
  const { name } = question.prescription;
  const reason = now.reasons[0]?.text ?? now.verdict;
  if (now.verdict === 'not-modelled') {
    return { subject: 'fold', code: 'not-modelled', calls: 'plan-needed', text: `${name}: not modelled, so a radiographer judges it. ${reason}` };
  }
  if (remedy) return { subject: 'fold', code: now.verdict, calls: 'plan-needed', text: `${name}: ${reason} Cheapest that is enough: ${remedy}` };
  return { subject: 'fold', code: 'no-remedy', calls: 'another-scanner', text: `${name}: ${reason} No remedy on this scanner is enough.` };
}

function holdFinding(question: Case, now: Assessment, known: boolean): Finding[] {
  const { prescription, patient, policy } = question;
  if (prescription.breathing !== 'breath-hold') return [];
  if (!known) {
    return [{ subject: 'breath-hold', code: 'breath-hold-unknown', calls: 'size-needed', needs: ['breath-hold-s'], text: 'How long the patient can hold their breath is not known.' }];
  }
  const held: Reading = patient.breathHoldS;
  const sure = Math.max(0, held.value - normalQuantile(policy.sureAt) * held.spread);
  const asked = now.time?.longestHoldS ?? 0;
  if (asked <= sure) return [];
  const seconds = (value: number) => `${Math.round(value * 10) / 10} s`;
  return [{
    subject: 'breath-hold', code: 'breath-hold-too-long', calls: 'plan-needed',
    text: `${prescription.name}: one breath-hold of ${seconds(asked)}; ${seconds(sure)} can be counted on (${seconds(held.value)} ± ${seconds(held.spread)}).`,
  }];
}

/** Each sequence by the engine, as it would be scanned here. */
export function checkSequences(cases: readonly Case[], breathHoldKnown: boolean, options: Options): SequencesAnswer {
  const findings: Finding[] = [];
  const sequences: SequenceCheck[] = [];
  for (const question of cases) {
    try {
      const now = assess(question);
      const accepted = passes(now, question) || (options.signedOff && now.verdict === 'fold-in-keep-clear');
      const remedy = accepted || now.verdict === 'not-modelled'
        ? undefined
        : rankRemedies(question).remedies.find(({ assessment }) => passes(assessment, question))?.sentence;
      // The table's limit is a finding of its own, said once.
      if (!accepted && now.reasons[0]?.code !== 'table-load-over-limit') findings.push(foldFinding(question, now, remedy));
      findings.push(...holdFinding(question, now, breathHoldKnown));
      const probability = options.probabilities ? probabilityOf(question) : undefined;
      sequences.push({
        name: question.prescription.name,
        verdict: now.verdict,
        reason: now.reasons[0]?.text ?? '',
        ...(probability === undefined ? {} : { foldProbability: probability }),
        ...(remedy === undefined ? {} : { remedy }),
        scanMinutes: Math.round(((now.time?.scanS ?? 0) / 60) * 100) / 100,
        longestHoldS: Math.round((now.time?.longestHoldS ?? 0) * 10) / 10,
      });
    } catch (error) {
      if (!(error instanceof DomainError)) throw error;
      findings.push({ subject: 'fold', code: 'not-modelled', calls: 'plan-needed', text: `${question.prescription.name}: cannot be worked out: ${error.message}.` });
    }
  }
  const distinct = findings.filter(({ text }, index) => findings.findIndex((other) => other.text === text) === index);
  return { findings: distinct, sequences, scanMinutes: sequences.reduce((sum, one) => sum + one.scanMinutes, 0) };
}
