import { describedCoil } from '../body/coil-reach';
import { regionCorners, windowRegion } from '../geometry/oriented-region';
import type { CoilElement } from '../model/scanner';
import {
  changed,
  NOTHING_TO_CHANGE,
  refused,
  withPrescription,
  type Change,
  type TargetedCase,
} from './change';

/** What the displayed window spans along z, mm from the isocentre. */
function windowAlongZ({ prescription, patient }: TargetedCase): readonly [number, number] {
  const z = regionCorners(windowRegion(prescription)).map((corner) => corner[2] - patient.isocentreZMm);
  return [Math.min(...z), Math.max(...z)];
}

/** As few neighbouring elements as still see the whole range; of equally many, those that see least beyond it. */
function fewest(
  elements: readonly CoilElement[],
  low: number,
  high: number,
): readonly CoilElement[] | undefined {
  const sorted = [...elements].sort((a, b) => a.seesFromMm - b.seesFromMm || a.seesToMm - b.seesToMm);
  let best: { readonly run: readonly CoilElement[]; readonly seen: number } | undefined;
  for (let from = 0; from < sorted.length; from++) {
    for (let to = from; to < sorted.length; to++) {
      const run = sorted.slice(from, to + 1);
      const start = Math.min(...run.map((element) => element.seesFromMm));
      const end = Math.max(...run.map((element) => element.seesToMm));
      if (start > low || end < high) continue;
      const seen = end - start;
      if (
        best === undefined ||
        run.length < best.run.length ||
        (run.length === best.run.length && seen < best.seen)
      )
        best = { run, seen };
    }
  }
  return best?.run;
}

/**
 * Elements that see only tissue beyond the picture are left out. Offered only where the site has described the coil,
 * and where some can be spared.
 */
export const coilElements: Change = (given) => {
  const { prescription: p } = given;
  const coil = describedCoil(given);
  if (coil === undefined) {
    return refused(
      'coil-elements-unknown',
      `The elements of “${p.coil}” are not described for this scanner, so none can be left out.`,
    );
  }
  const used = coil.elements.filter((element) => p.coilElements?.includes(element.name) ?? true);
  const [low, high] = windowAlongZ(given);
  const enough = fewest(used, low, high);
  if (enough === undefined || enough.length === used.length) return NOTHING_TO_CHANGE;
  const left = used.filter((element) => !enough.includes(element)).map((element) => element.name);
  return changed(
    withPrescription(given, { coilElements: enough.map((element) => element.name) }),
    `Elements left out: ${left.join(', ')}; the ends of the picture lose signal`,
  );
};
