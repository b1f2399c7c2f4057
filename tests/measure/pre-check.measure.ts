import { casesAsBooked } from '@/lib/domain/booking/assess-as-booked';
import { composePatient } from '@/lib/domain/size-reading/compose-patient';
import { preCheck } from '@/lib/domain/pre-check/pre-check';
import { assess } from '@/lib/physics';
import { checkedProtocol, preCheckQuestion, wide } from '@/tests/support/pre-check-questions';
import { quantile, time, type Measure } from './row';

const RUNS = 40;

/** A moderate abdomen with arms up and five sequences, one of which folds: the everyday check. */
function question() {
  const protocol = checkedProtocol([
    wide(), wide({ name: 'Second', fovPhaseMm: 400 }), wide({ name: 'Third', fovPhaseMm: 420 }), wide({ name: 'Fourth', fovPhaseMm: 440 }),
    wide({ name: 'Narrow', fovPhaseMm: 240 }),
  ]);
  return preCheckQuestion({ protocol });
}

/** The whole check against the bare engine on the same five sequences, in one run. */
export const measure: Measure = async () => {
  const asked = question();
  const { patient } = composePatient({
    readings: asked.readings, region: 'abdomen', tissueReachMm: asked.scanner.document.scanner.tissueReachMm, policy: asked.policy, now: asked.booking.scheduledAt,
  });
  if (!patient) throw new Error('The measured question has every size.');
  const cases = casesAsBooked({
    patient, protocol: asked.protocol.document, sequences: asked.protocol.sequences, scanner: asked.scanner.document.scanner, policy: asked.policy,
  });
  const bare = quantile(time(() => cases.forEach((one) => assess(structuredClone(one))), RUNS, 5), 0.5);
  const whole = quantile(time(() => preCheck(structuredClone(asked)), RUNS, 5), 0.5);
  return [
    { what: 'pre-checks of five sequences, pure', value: 1000 / whole, unit: 'checks/s' },
    {
      what: 'pre-check over the bare engine', value: whole / bare, unit: 'times',
      against: 'assess on the same five sequences; the rest is fold probability, the cheapest remedy and the opening',
    },
  ];
};
