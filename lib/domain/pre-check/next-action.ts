import type { PlanState } from '@/lib/domain/plan/states';
import { QUANTITY_FACTS, type SizeQuantity } from '@/lib/domain/size-reading/quantities';
import type { Alternative, Finding, NextAction, PreCheckResult } from './result';

interface Known {
  readonly result: PreCheckResult;
  readonly findings: readonly Finding[];
  readonly alternatives: readonly Alternative[];
  readonly planState?: PlanState;
}

const wordsOf = (needs: readonly SizeQuantity[]): string => needs.map((quantity) => QUANTITY_FACTS[quantity].label).join(', ');

function askForSizes(findings: readonly Finding[]): NextAction {
  const asking = findings.filter((finding) => finding.calls === 'size-needed');
  const needs = [...new Set(asking.flatMap((finding) => finding.needs ?? []))];
  const measured = asking.length > 0 && asking.every(({ measuredOnly }) => measuredOnly);
  return measured
    ? { kind: 'measure', text: `Have it measured: ${wordsOf(needs)}`, needs }
    : { kind: 'ask-sizes', text: `Ask for ${wordsOf(needs)}`, needs };
}

/** The one thing that moves a booking on for the least effort. */
export function nextAction({ result, findings, alternatives, planState }: Known): NextAction {
  const escalate: NextAction = { kind: 'escalate', text: 'Ask a lead to decide' };
  switch (result) {
    case 'as-booked':
      return { kind: 'none', text: 'Nothing to do' };
    case 'size-needed':
      return askForSizes(findings);
    case 'plan-needed': {
      const planning = findings.filter((finding) => finding.calls === 'plan-needed');
      if (planning.every(({ subject }) => subject === 'minutes')) return { kind: 'propose-time', text: 'Propose a longer slot' };
      return planState === 'draft' ? { kind: 'finish-plan', text: 'Finish the plan' } : { kind: 'plan', text: 'Plan on the bench' };
    }
    case 'another-scanner': {
      // What the booked scanner cannot do is settled; what is asked now is which of the others can.
      const found = alternatives.find(({ standing }) => standing === 'fits');
      if (found) return { kind: 'propose', text: `Propose ${found.scannerName}`, scannerId: found.scannerId };
      const open = alternatives.filter(({ standing }) => standing === 'open');
      if (open.length > 0) return askForSizes([...findings, ...open.flatMap((one) => one.open)]);
      return { kind: 'propose-time', text: 'Propose another time' };
    }
    case 'escalate':
      return escalate;
  }
}
