import type { Patient, Prescription, Reading, Scanner } from '@/lib/domain/case/model';
import { isMeasured, standingOf } from './limits';
import type { Finding, Load } from './result';

const across = (a: Reading, b: Reading): Reading => ({
  ...a, value: a.value + b.value, source: isMeasured(a) && isMeasured(b) ? 'measured' : isMeasured(a) ? b.source : a.source,
});

/** The body against the part of the magnet that is mapped rightly: beyond it tissue folds at a place nobody can name. */
export function checkLargestFov(
  { extents }: Pick<Patient, 'extents'>,
  prescriptions: readonly Prescription[],
  scanner: Scanner,
): { readonly findings: readonly Finding[]; readonly largestFov: Load } {
  const [x, y] = scanner.limits.usableFovMm;
  const breadth = across(extents.right, extents.left);
  const depth = across(extents.anterior, extents.posterior);
  const findings: Finding[] = [];
  for (const [name, quantity, reading, limit] of [
    ['breadth', 'breadth-mm', breadth, x], ['depth', 'depth-mm', depth, y],
  ] as const) {
    const mm = Math.round(reading.value);
    const standing = standingOf(reading, limit);
    if (standing === 'within') continue;
    const unmeasured = !isMeasured(reading);
    findings.push({
      subject: 'largest-fov', code: unmeasured ? 'fov-near-limit' : 'beyond-usable-fov',
      text: unmeasured
        ? `A ${name} of ${mm} mm is ${standing === 'over' ? 'beyond' : 'within 10 % of'} the ${limit} mm this scanner maps rightly, and was not measured.`
        : `A ${name} of ${mm} mm is beyond the ${limit} mm this scanner maps rightly: what lies outside folds at an uncertain place.`,
      calls: unmeasured ? 'size-needed' : 'plan-needed',
      ...(unmeasured ? { needs: [quantity], measuredOnly: true as const } : {}),
    });
  }
  const asked = Math.max(...prescriptions.flatMap(({ fovPhaseMm, fovReadoutMm }) => [fovPhaseMm, fovReadoutMm]));
  if (asked > scanner.limits.fovMaxMm) {
    findings.push({
      subject: 'largest-fov', code: 'fov-too-large', calls: 'another-scanner',
      text: `The protocol asks for a FOV of ${Math.round(asked)} mm; this scanner’s largest is ${scanner.limits.fovMaxMm} mm.`,
    });
  }
  const breadthCounts = breadth.value / x >= depth.value / y;
  const tightest = breadthCounts ? breadth : depth;
  return {
    findings,
    largestFov: { value: Math.round(tightest.value), limit: breadthCounts ? x : y, measured: isMeasured(tightest) },
  };
}
